import { BigButton, Screen, Trouble } from './pieces.tsx';
import type { Found } from './FindScreen.tsx';

/** Those whose name fits what was written; or none of them. */
export function ChooseScreen({
  found,
  busy,
  trouble,
  onChoose,
  onNew,
  onBack,
}: {
  found: Found;
  busy: boolean;
  trouble: string | null;
  onChoose: (personId: string) => void;
  onNew: () => void;
  onBack: () => void;
}) {
  const { people, name } = found;
  return (
    <Screen
      title={people.length === 0 ? `Nobody here is called “${name}”` : 'Which one is you?'}
      actions={
        <>
          <BigButton kind="quiet" className="w-1/3" disabled={busy} onClick={onBack}>
            Back
          </BigButton>
          <BigButton
            kind={people.length === 0 ? 'main' : 'quiet'}
            className="grow"
            disabled={busy}
            onClick={onNew}
          >
            I am not on the list
          </BigButton>
        </>
      }
    >
      {people.length === 0 && (
        <p className="text-[1.125rem]">Go back to write it another way, or add yourself: it is done once.</p>
      )}
      <ul className="space-y-3">
        {people.map((person) => (
          <li key={person.id}>
            <button
              type="button"
              disabled={busy}
              onClick={() => onChoose(person.id)}
              className="block min-h-14 w-full rounded-[3px] border border-edge bg-sheet px-4 py-3 text-left text-[1.125rem] text-ink disabled:opacity-60"
            >
              <span className="font-semibold">{person.name}</span>
              <span className="block text-base text-ink-soft">{person.employer}</span>
            </button>
          </li>
        ))}
      </ul>
      <Trouble words={trouble} />
    </Screen>
  );
}
