import { useState } from 'react';
import type { Outbox, Outgoing } from './outbox.ts';
import { BigButton } from './pieces.tsx';
import { useOutgoing } from './useOutgoing.ts';

/** What is still only on this device, and what the server refused; nothing is shown where there is nothing. */
export function UnsentNotice({ outbox }: { outbox: Outbox }) {
  const outgoing = useOutgoing(outbox);
  const mine = outgoing.filter(({ carrier }) => outbox.maySend(carrier));
  const waiting = mine.filter(({ state }) => state === 'waiting');
  const others = outgoing.filter((kept) => kept.state === 'waiting' && !mine.includes(kept)).length;
  const refused = mine.filter(({ state }) => state === 'refused');
  return (
    <div
      role="status"
      className={waiting.length + refused.length + others > 0 ? 'mx-auto mt-4 w-full max-w-[40rem] px-4' : ''}
    >
      {waiting.length > 0 && (
        <div className="border-l-8 border-line bg-sheet py-3 pl-3 pr-2">
          <p className="font-semibold">
            {waiting.length === 1 ? '1 signature is' : `${waiting.length} signatures are`} kept on this phone
            and will be sent.
          </p>
          <ul className="list-disc pl-6">
            {waiting.map(({ id, person, title }) => (
              <li key={id}>
                {person}: {title}
              </li>
            ))}
          </ul>
          <BigButton kind="quiet" className="mt-2" onClick={() => void outbox.flush()}>
            Send now
          </BigButton>
        </div>
      )}
      {others > 0 && (
        <p className="mt-2 border-l-8 border-zinc bg-sheet py-3 pl-3 pr-2">
          {others === 1 ? '1 signature waits' : `${others} signatures wait`} here for somebody else: it is
          sent once whoever made it is known to this device again.
        </p>
      )}
      {refused.map((kept) => (
        <Refused key={kept.id} kept={kept} outbox={outbox} />
      ))}
    </div>
  );
}

function Refused({ kept, outbox }: { kept: Outgoing; outbox: Outbox }) {
  const [sure, setSure] = useState(false);
  return (
    <div className="mt-2 border-l-8 border-oxide bg-sheet py-3 pl-3 pr-2">
      <p className="font-semibold text-oxide">The signature of {kept.person} was not accepted.</p>
      <p>
        {kept.title}: {kept.trouble} It stays on this device until you remove it. Show this to your
        supervisor.
      </p>
      <div className="mt-2 flex flex-wrap gap-2">
        <BigButton kind="quiet" onClick={() => void outbox.tryAgain(kept.id)}>
          Try again
        </BigButton>
        <BigButton kind="stop" onClick={() => (sure ? void outbox.forget(kept.id) : setSure(true))}>
          {sure ? 'Remove it for good: it is nowhere else' : 'Remove it'}
        </BigButton>
      </div>
    </div>
  );
}
