import { formatInstant } from '#shared/kernel/work-date.ts';
import { signatureSvg } from '#shared/signons/signature.ts';
import type { Outbox, Outgoing } from './outbox.ts';
import { OutgoingStatus } from './OutgoingStatus.tsx';
import { BigButton, Screen } from './pieces.tsx';
import { useOutgoing } from './useOutgoing.ts';

/** The receipt: what was signed, by whom and when, and whether it has arrived. */
export function DoneScreen({
  id,
  outbox,
  nextLabel,
  onNext,
  onNewRevision,
}: {
  id: string;
  outbox: Outbox;
  nextLabel: string;
  onNext: () => void;
  onNewRevision: () => void;
}) {
  const outgoing = useOutgoing(outbox).find((kept) => kept.id === id);
  if (!outgoing) return null;
  return (
    <Screen
      title="Signed"
      actions={
        outgoing.superseded ? (
          <BigButton className="grow text-[1.125rem]" onClick={onNewRevision}>
            Read the new revision
          </BigButton>
        ) : (
          <BigButton className="grow text-[1.125rem]" onClick={onNext}>
            {nextLabel}
          </BigButton>
        )
      }
    >
      <div className="text-[1.125rem]">
        <div role="status">
          <OutgoingStatus outgoing={outgoing} durable={outbox.isDurable()} />
        </div>
        {outgoing.superseded && (
          <p className="mt-3 border-l-8 border-line bg-sheet py-3 pl-3 pr-2">
            A newer revision was issued while you were reading. Your signature is kept for the one you read.
            Read and sign the new one before you go on.
          </p>
        )}
        <Receipt outgoing={outgoing} />
        {outgoing.state === 'refused' && (
          <p className="mt-3">It stays on this device. Show this to your supervisor.</p>
        )}
      </div>
    </Screen>
  );
}

function Receipt({ outgoing }: { outgoing: Outgoing }) {
  const { signature, signedAt } = outgoing.signed.body;
  return (
    <dl className="mt-4 space-y-2 border-l-4 border-zinc bg-sheet py-3 pl-3 pr-2">
      <Line term="What">{outgoing.title}</Line>
      <Line term="Who">{outgoing.person}</Line>
      <Line term="When">{formatInstant(signedAt, outgoing.timeZone)}</Line>
      <Line term="Signature">
        {signature.method === 'drawn' ? (
          <img
            alt={`Signature of ${outgoing.person}`}
            className="mt-1 w-full max-w-72 rounded-[3px] bg-[#ffffff] p-1"
            src={`data:image/svg+xml,${encodeURIComponent(signatureSvg(signature.drawn))}`}
          />
        ) : (
          `${signature.typedName}, typed; witness ${signature.witness}`
        )}
      </Line>
      <Line term="Receipt">
        <span className="break-all text-base">{outgoing.id}</span>
      </Line>
    </dl>
  );
}

function Line({ term, children }: { term: string; children: React.ReactNode }) {
  return (
    <div>
      <dt className="text-base text-ink-soft">{term}</dt>
      <dd>{children}</dd>
    </div>
  );
}
