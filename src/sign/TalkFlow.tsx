import { formatDay } from '#shared/kernel/work-date.ts';
import { fillWords } from '#shared/library/declaration.ts';
import type { Signature } from '#shared/signons/signature.ts';
import type { ToSign } from '#shared/signons/signons.api.ts';
import { SignScreen } from './SignScreen.tsx';

/** A toolbox talk's attendance: what was talked about, and the signature under it. */
export function TalkFlow({
  talk,
  toSign,
  witness,
  onSigned,
  onLeave,
}: {
  talk: ToSign['talks'][number];
  toSign: ToSign;
  witness?: string;
  onSigned: (signature: Signature) => Promise<void>;
  onLeave: () => void;
}) {
  const { talkDeclaration } = toSign;
  const date = formatDay(talk.date);
  const words = fillWords(talkDeclaration.words, { topic: talk.topic, date });
  return (
    <SignScreen
      title={`Toolbox talk: ${talk.topic}`}
      signer={toSign.person.name}
      declaration={{ ...talkDeclaration, words }}
      {...(witness ? { witness } : {})}
      onSign={onSigned}
      onBack={onLeave}
    >
      <p className="mb-3 text-ink-soft">
        {date}, {talk.time}, {talk.place}. Presented by {talk.presenter}.
      </p>
      {talk.points.length > 0 && (
        <ul className="mb-4 list-disc space-y-2 pl-6 text-[1.125rem]">
          {talk.points.map((point) => (
            <li key={point}>{point}</li>
          ))}
        </ul>
      )}
    </SignScreen>
  );
}
