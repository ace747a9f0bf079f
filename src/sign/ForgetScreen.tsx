import { BigButton, Screen, Trouble } from './pieces.tsx';

/** "Not me": what is forgotten, what stays, and what would have to wait. */
export function ForgetScreen({
  name,
  unsent,
  busy,
  trouble,
  onForget,
  onKeep,
}: {
  name: string;
  /** Signatures of this person that have not been sent. */
  unsent: number;
  busy: boolean;
  trouble: string | null;
  onForget: () => void;
  onKeep: () => void;
}) {
  return (
    <Screen
      title={`Is this not ${name}’s phone?`}
      actions={
        <>
          <BigButton className="grow" disabled={busy} onClick={onKeep}>
            Keep it
          </BigButton>
          <BigButton kind="stop" className="grow" disabled={busy} onClick={onForget}>
            {busy ? 'Forgetting…' : 'Forget this phone'}
          </BigButton>
        </>
      }
    >
      <div className="space-y-3 text-[1.125rem]">
        <p>
          The phone will no longer know who you are. What {name} has signed stays in the register. Whoever
          uses the phone next needs the day code.
        </p>
        {unsent > 0 && (
          <p className="border-l-8 border-line bg-sheet py-3 pl-3 pr-2">
            {unsent === 1 ? '1 signature has' : `${unsent} signatures have`} not been sent yet. Nobody else
            can send it: it waits on this phone until {name} finds themselves here again. Better: keep the
            phone until it says “Sent”.
          </p>
        )}
        <Trouble words={trouble} />
      </div>
    </Screen>
  );
}
