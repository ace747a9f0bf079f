import { Refusal } from '#shared/kernel/refusal.ts';
import { BigButton, Screen } from './pieces.tsx';

/** What stands while something is fetched, and what is said where it could not be. */
export function LoadScreen({
  trouble,
  waiting,
  onAgain,
  onBack,
}: {
  trouble: Error | null;
  waiting: string;
  onAgain: () => void;
  onBack?: () => void;
}) {
  if (!trouble)
    return (
      <p role="status" className="mx-auto w-full max-w-[42rem] p-4 text-[1.125rem]">
        {waiting}
      </p>
    );
  const offline = trouble instanceof Refusal && trouble.code === 'offline';
  return (
    <Screen
      title={offline ? 'No signal' : 'This could not be opened'}
      actions={
        <>
          {onBack && (
            <BigButton kind="quiet" className="w-1/3" onClick={onBack}>
              Back
            </BigButton>
          )}
          <BigButton className="grow" onClick={onAgain}>
            Try again
          </BigButton>
        </>
      }
    >
      <p className="text-[1.125rem]">
        {offline
          ? 'This needs signal once, and there is none. Move to where you have a bar and try again. What you signed on this device is safe on it and will be sent.'
          : trouble.message}
      </p>
    </Screen>
  );
}
