import type { Editor } from '@tiptap/core';
import { blocks, type Gap, type GapSeverity } from '#shared/statements/readiness.ts';
import { apply, selectPassage } from './edits.ts';

const groups: { severity: GapSeverity; title: string; words: string }[] = [
  {
    severity: 'law',
    title: 'Required by law',
    words: 'These stop the issue. The clause says where it stands.',
  },
  { severity: 'rule', title: 'Our own rule', words: 'These stop the issue.' },
  { severity: 'advice', title: 'Recommended', words: 'These do not stop the issue.' },
];

/** What is missing or weak, each with a jump to its place. The server asks the same rules when the statement is issued. */
export function Readiness({ editor, gaps }: { editor: Editor; gaps: Gap[] }) {
  if (gaps.length === 0) return <p className="text-lichen">Nothing is missing that can be told from here.</p>;
  const stopping = gaps.filter(blocks).length;
  return (
    <div className="flex flex-col gap-4">
      <p role="status">
        {stopping === 0
          ? 'Nothing stops the issue.'
          : `${stopping} of ${gaps.length} ${stopping === 1 ? 'stops' : 'stop'} the issue.`}
      </p>
      {groups.map(({ severity, title, words }) => {
        const own = gaps.filter((gap) => gap.severity === severity);
        return own.length === 0 ? null : (
          <section key={severity}>
            <h3 className="font-semibold">
              {title}, {own.length}
            </h3>
            <p className="text-sm text-ink-soft">{words}</p>
            <ul>
              {own.map((gap, index) => (
                <li key={index} className="border-b border-zinc">
                  <button
                    type="button"
                    className="w-full py-1.5 text-left hover:text-chalk"
                    onClick={() => jump(editor, gap)}
                  >
                    {gap.words}{' '}
                    {gap.clause ? <span className="text-sm text-ink-soft">{gap.clause}</span> : null}
                  </button>
                </li>
              ))}
            </ul>
          </section>
        );
      })}
    </div>
  );
}

function jump(editor: Editor, { place }: Gap): void {
  if (place.kind === 'node') {
    apply(editor, selectPassage(place.id));
    editor.commands.focus();
    return;
  }
  const field = place.kind === 'titleBlock' ? `[data-field="${place.field}"]` : '.ProseMirror';
  const target = document.querySelector(field);
  target?.scrollIntoView({ block: 'center' });
  target?.querySelector<HTMLElement>('input, textarea')?.focus();
}
