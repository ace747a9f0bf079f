import { type NodeViewProps, NodeViewWrapper } from '@tiptap/react';
import { useId, useState } from 'react';
import type { Particulars } from '#shared/statements/document/attributes.ts';
import { inputLook } from '../ui/Field.tsx';
import { useSurroundings } from './StatementContext.ts';

type Change = (change: Partial<Particulars>) => void;
type TextName = {
  [Name in keyof Particulars]: Particulars[Name] extends string ? Name : never;
}[keyof Particulars];

const texts: { name: TextName; label: string; help: string; lines?: number }[] = [
  { name: 'job', label: 'The job', help: 'What is done, how much of it.', lines: 2 },
  { name: 'place', label: 'Where on the site', help: '' },
  {
    name: 'circumstances',
    label: 'Circumstances of the site',
    help: 'Ground, access, slope, neighbours, lines, other trades.',
    lines: 3,
  },
  {
    name: 'managementPlan',
    label: 'Site safety plan taken into account',
    help: 'Which plan, and what in it matters here.',
    lines: 2,
  },
  { name: 'responsible', label: 'Who sees that it is followed', help: 'Name and role.' },
  { name: 'implementation', label: 'How controls are put in place', help: '', lines: 2 },
  { name: 'monitoring', label: 'How controls are watched', help: '', lines: 2 },
  {
    name: 'review',
    label: 'How controls are reviewed',
    help: 'When, by whom, and at once after what.',
    lines: 2,
  },
  {
    name: 'consultation',
    label: 'Who was consulted',
    help: 'Workers and their representative; when; what came of it.',
    lines: 2,
  },
  {
    name: 'emergency',
    label: 'Emergency and rescue',
    help: 'Who does what; how a person is brought down.',
    lines: 2,
  },
];

/** The title block, edited in place like a drawing's. It is a node of the document: its changes are in the one undo history. */
export function TitleBlockView({ node, updateAttributes, editor }: NodeViewProps) {
  const particulars = node.attrs as Particulars;
  const readOnly = !editor.isEditable;
  const change: Change = updateAttributes;
  return (
    <NodeViewWrapper as="header" contentEditable={false} className="title-block" data-node="titleBlock">
      <h2 className="text-lg">Particulars</h2>
      <div className="mt-2 grid gap-3 sm:grid-cols-2">
        {texts.map((text) => (
          <TextPart
            key={text.name}
            {...text}
            value={particulars[text.name]}
            readOnly={readOnly}
            change={change}
          />
        ))}
        <DatePart
          label="Work starts"
          name="workFrom"
          value={particulars.workFrom}
          readOnly={readOnly}
          change={change}
        />
        <DatePart
          label="Work ends"
          name="workTo"
          value={particulars.workTo}
          readOnly={readOnly}
          change={change}
        />
        <DatePart
          label="Review by"
          name="reviewDate"
          value={particulars.reviewDate}
          readOnly={readOnly}
          change={change}
        />
        <DatePart
          label="Copy to the principal contractor on"
          name="principalContractorCopy"
          value={particulars.principalContractorCopy}
          readOnly={readOnly}
          change={change}
        />
      </div>
      <HighRisk ticked={particulars.highRisk} readOnly={readOnly} change={change} />
    </NodeViewWrapper>
  );
}

type Part = { label: string; readOnly: boolean; change: Change };

function TextPart({
  name,
  label,
  help,
  lines = 1,
  value,
  readOnly,
  change,
}: Part & { name: TextName; help: string; lines?: number; value: string }) {
  const id = useId();
  // What is typed shows at once; the document follows, and leads again when undo changes it.
  const [text, setText] = useState(value);
  const [known, setKnown] = useState(value);
  if (known !== value) {
    setKnown(value);
    setText(value);
  }
  const set = (next: string) => {
    setText(next);
    setKnown(next);
    change({ [name]: next });
  };
  const shared = {
    id,
    value: text,
    readOnly,
    'aria-describedby': help ? `${id}-help` : undefined,
    className: `${inputLook} py-1.5`,
  };
  return (
    <div className={lines > 1 ? 'sm:col-span-2' : ''} data-field={name}>
      <label htmlFor={id} className="text-sm font-medium">
        {label}
      </label>
      {help ? (
        <span id={`${id}-help`} className="ml-2 text-sm text-ink-soft">
          {help}
        </span>
      ) : null}
      {lines > 1 ? (
        <textarea {...shared} rows={lines} maxLength={4000} onChange={(event) => set(event.target.value)} />
      ) : (
        <input {...shared} maxLength={300} onChange={(event) => set(event.target.value)} />
      )}
    </div>
  );
}

function DatePart({
  label,
  name,
  value,
  readOnly,
  change,
}: Part & { name: keyof Particulars; value: string | null }) {
  const id = useId();
  return (
    <div data-field={name}>
      <label htmlFor={id} className="text-sm font-medium">
        {label}
      </label>
      <input
        id={id}
        type="date"
        readOnly={readOnly}
        className={inputLook}
        value={value ?? ''}
        onChange={(event) => change({ [name]: event.target.value || null })}
      />
    </div>
  );
}

function HighRisk({ ticked, readOnly, change }: { ticked: string[]; readOnly: boolean; change: Change }) {
  const { profile } = useSurroundings();
  const toggle = (key: string) =>
    change({
      highRisk: ticked.includes(key) ? ticked.filter((other) => other !== key) : [...ticked, key].sort(),
    });
  return (
    <fieldset className="mt-4" data-field="highRisk">
      <legend className="text-sm font-medium">{profile.highRiskTerm}</legend>
      <div className="mt-1 grid gap-x-4 sm:grid-cols-2">
        {profile.highRisk.map(({ key, words, clause }) => (
          <label key={key} className="flex min-h-8 items-start gap-2 py-1 pointer-coarse:min-h-12">
            <input
              type="checkbox"
              className="size-6 shrink-0 accent-chalk"
              checked={ticked.includes(key)}
              disabled={readOnly}
              onChange={() => toggle(key)}
            />
            <span>
              {words} <span className="text-sm text-ink-soft">{clause}</span>
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
