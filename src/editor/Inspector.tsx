import type { Editor } from '@tiptap/core';
import { useEditorState } from '@tiptap/react';
import { Trash2 } from 'lucide-react';
import type { ReactNode } from 'react';
import {
  type ControlLevel,
  controlLevelNames,
  controlLevels,
  hazardCategories,
  hazardCategoryNames,
} from '#shared/library/block.ts';
import type { FillIn } from '#shared/statements/document/attributes.ts';
import { Button } from '../ui/Button.tsx';
import { SelectField, TextField } from '../ui/Field.tsx';
import { apply, removePassage, setAttributes } from './edits.ts';
import { FillInForm } from './FillInForm.tsx';
import { passageInHand } from './passages.ts';
import { RatingField } from './RatingField.tsx';

type InHand = { type: string; id: string; attrs: Record<string, unknown> };

/** The one overlay at the selection: edits whatever passage the cursor stands in. */
export function Inspector({ editor, folded = false }: { editor: Editor; folded?: boolean }) {
  const inHand = useEditorState({
    editor,
    selector: ({ editor: { state } }): InHand | null => {
      const passage = passageInHand(state);
      const id = passage?.node.attrs.id as string | null | undefined;
      return passage && id ? { type: passage.node.type.name, id, attrs: passage.node.attrs } : null;
    },
  });
  if (!inHand || !editor.isEditable) return null;
  const { id, type, attrs } = inHand;
  const set = (change: Record<string, unknown>) => void apply(editor, setAttributes(id, change));
  const remove = () => {
    apply(editor, removePassage(id));
    editor.commands.focus();
  };
  const form = (
    <>
      {type === 'fillIn' ? <FillInForm key={id} editor={editor} fillIn={attrs as FillIn} set={set} /> : null}
      {type === 'control' ? <ControlForm attrs={attrs} set={set} /> : null}
      {type === 'hazard' ? <HazardForm attrs={attrs} set={set} /> : null}
      {type === 'holdPoint' ? (
        <Named name="Hold point">
          <TextField
            label="Released by"
            help="A role, or a person."
            value={attrs.releasedBy as string}
            maxLength={80}
            onChange={(event) => set({ releasedBy: event.target.value })}
          />
        </Named>
      ) : null}
      {type === 'stopIf' ? <Named name="Stop if">{null}</Named> : null}
      {type === 'step' ? <StepForm attrs={attrs} set={set} /> : null}
      <Button kind="bare" icon={Trash2} onClick={remove} className="self-start">
        Remove this {names[type]}
      </Button>
    </>
  );
  // On a narrow screen it would cover the text: it opens by itself only for a hole, which is there to be filled.
  if (folded && type !== 'fillIn') {
    return (
      <details className="inspector">
        <summary className="min-h-6 font-medium">Change this {names[type]}</summary>
        <div className="mt-3 flex flex-col gap-3">{form}</div>
      </details>
    );
  }
  return (
    <section aria-label="What is selected" className="inspector">
      {form}
    </section>
  );
}

const names: Record<string, string> = {
  fillIn: 'fill-in',
  control: 'control',
  hazard: 'hazard',
  holdPoint: 'hold point',
  stopIf: 'stop-if',
  step: 'step',
};

type Form = { attrs: Record<string, unknown>; set: (change: Record<string, unknown>) => void };

function Named({ name, children }: { name: string; children: ReactNode }) {
  return (
    <>
      <h2 className="font-semibold">{name}</h2>
      {children}
    </>
  );
}

function ControlForm({ attrs, set }: Form) {
  return (
    <Named name="Control">
      <SelectField
        label="Level"
        choices={controlLevels.map((value) => ({ value, label: controlLevelNames[value] }))}
        value={attrs.level as ControlLevel}
        onChange={(event) => set({ level: event.target.value })}
      />
      <TextField
        label="Who sees to it"
        maxLength={80}
        value={attrs.role as string}
        onChange={(event) => set({ role: event.target.value })}
      />
      <TextField
        label="How and how often it is checked"
        maxLength={300}
        value={attrs.check as string}
        onChange={(event) => set({ check: event.target.value })}
      />
    </Named>
  );
}

function HazardForm({ attrs, set }: Form) {
  return (
    <Named name="Hazard">
      <RatingField label="Before controls" rating={attrs.initial} onChange={(initial) => set({ initial })} />
      <RatingField
        label="After controls"
        rating={attrs.residual}
        onChange={(residual) => set({ residual })}
      />
      <SelectField
        label="Kind of hazard"
        choices={hazardCategories.map((value) => ({ value, label: hazardCategoryNames[value] }))}
        value={attrs.category as string}
        onChange={(event) => set({ category: event.target.value })}
      />
    </Named>
  );
}

function StepForm({ attrs, set }: Form) {
  return (
    <Named name="Step">
      <TextField
        label="On the crew card"
        help="The step in plain words, as the worker reads it. Empty shows the step’s own text."
        maxLength={600}
        value={attrs.card as string}
        onChange={(event) => set({ card: event.target.value })}
      />
    </Named>
  );
}
