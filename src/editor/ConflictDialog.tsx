import { Download } from 'lucide-react';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import type { DraftConflict } from '#shared/statements/statements.api.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';

type ConflictProps = {
  theirs: DraftConflict;
  mine: { title: string; document: NodeJson };
  timeZone: string;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
};

/** Two people saved: both texts are here, and a person chooses. The one not chosen can be kept as a file. */
export function ConflictDialog({ theirs, mine, timeZone, onKeepMine, onTakeTheirs }: ConflictProps) {
  const differing = stepsThatDiffer(mine.document, theirs.document);
  return (
    <Dialog
      firm
      open
      onClose={() => undefined}
      title="Somebody else saved this draft"
      lead={`${theirs.updatedBy} saved it on ${formatInstant(theirs.updatedAt, timeZone)}, after you opened it. Nothing of yours is lost.`}
    >
      <h3 className="font-semibold">What differs</h3>
      <ul className="max-h-48 list-disc overflow-y-auto pl-5">
        {mine.title === theirs.title ? null : (
          <li>
            The title: yours “{mine.title}”, theirs “{theirs.title}”
          </li>
        )}
        {differing.map((words) => (
          <li key={words}>{words}</li>
        ))}
        {differing.length === 0 && mine.title === theirs.title ? (
          <li>Only the particulars or single words.</li>
        ) : null}
      </ul>
      <div className="flex flex-wrap gap-2">
        <Button icon={Download} onClick={() => download(mine, 'my draft.json')}>
          Keep mine as a file
        </Button>
        <Button icon={Download} onClick={() => download(theirs, 'their draft.json')}>
          Keep theirs as a file
        </Button>
      </div>
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onTakeTheirs}>Go on with theirs</Button>
        <Button kind="filled" onClick={onKeepMine}>
          Go on with mine
        </Button>
      </div>
    </Dialog>
  );
}

function stepsThatDiffer(mine: NodeJson, theirs: NodeJson): string[] {
  const own = outlineOf(mine).steps;
  const other = outlineOf(theirs).steps;
  const changed = own.flatMap((step) => {
    const twin = other.find(({ id }) => id === step.id);
    if (!twin) return [`Only in yours: step ${step.number}, ${step.title}`];
    return JSON.stringify({ ...twin, number: 0 }) === JSON.stringify({ ...step, number: 0 })
      ? []
      : [`Differs: step ${step.number}, ${step.title}`];
  });
  const added = other
    .filter(({ id }) => !own.some((step) => step.id === id))
    .map(({ number, title }) => `Only in theirs: step ${number}, ${title}`);
  return [...changed, ...added];
}

function download(content: unknown, name: string): void {
  const address = URL.createObjectURL(
    new Blob([JSON.stringify(content, null, 2)], { type: 'application/json' }),
  );
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  URL.revokeObjectURL(address);
}
