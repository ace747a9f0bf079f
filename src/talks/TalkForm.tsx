import { Plus, Trash2 } from 'lucide-react';
import type { ReactNode } from 'react';
import { useFieldArray } from 'react-hook-form';
import type { SendForm } from '../lib/useSendForm.ts';
import { Button } from '../ui/Button.tsx';
import { CheckField, SelectField, TextArea, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { newAction, type TalkFormInput } from './talk-form.ts';

type TalkFormProps = {
  form: SendForm<TalkFormInput>;
  sites: { id: string; name: string }[];
  /** People have signed it at its site: it can't move. */
  siteIsFixed: boolean;
  act: string;
  extra?: ReactNode;
};

/** Every field of a talk that may still be written. */
export function TalkForm({ form, sites, siteIsFixed, act, extra }: TalkFormProps) {
  const { register, formState } = form;
  const { errors } = formState;
  return (
    <Form form={form} act={act} extra={extra}>
      <TextField label="Topic" maxLength={160} {...register('topic')} error={errors.topic?.message} />
      <div className="grid gap-4 sm:grid-cols-2">
        {siteIsFixed ? (
          <p className="self-end pb-2 text-ink-soft">The site is fixed: people have signed.</p>
        ) : (
          <SelectField
            label="Site"
            empty="Choose"
            choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
            {...register('siteId')}
            error={errors.siteId ? 'Choose the site.' : undefined}
          />
        )}
        <TextField label="Presenter" {...register('presenter')} error={errors.presenter?.message} />
        <TextField label="Date" type="date" {...register('date')} error={errors.date?.message} />
        <TextField label="Time" type="time" {...register('time')} error={errors.time?.message} />
        <TextField
          label="Minutes"
          type="number"
          inputMode="numeric"
          min={1}
          max={240}
          {...register('minutes', { valueAsNumber: true })}
          error={errors.minutes ? 'Between 1 and 240 minutes.' : undefined}
        />
        <TextField label="Place" {...register('place')} error={errors.place?.message} />
      </div>
      <TextArea
        label="Points"
        help="One a line. The crew sees them above the signature."
        rows={6}
        {...register('points')}
        error={pointsError(errors.points)}
      />
      <TextArea
        label="Matters raised"
        help="What the crew said, asked and objected to, in their words."
        {...register('mattersRaised')}
        error={errors.mattersRaised?.message}
      />
      <TextArea
        label="Outcome"
        help="What was decided, and who was told."
        {...register('outcome')}
        error={errors.outcome?.message}
      />
      <CheckField
        label="A health and safety representative was there"
        {...register('representativePresent')}
      />
      <Actions form={form} />
    </Form>
  );
}

/** The first message among the lines. */
function pointsError(error: unknown): string | undefined {
  if (!error) return undefined;
  const { message } = error as { message?: string };
  return message ?? 'Keep each point under 500 characters, and 40 points at most.';
}

function Actions({ form }: Pick<TalkFormProps, 'form'>) {
  const { control, register, formState, watch } = form;
  // Our actions carry an id of their own; the list's key must not take its name.
  const { fields, append, remove } = useFieldArray({ control, name: 'actions', keyName: 'key' });
  return (
    <fieldset className="flex flex-col gap-3">
      <legend className="mb-2 font-medium">Actions</legend>
      {fields.map((field, index) => {
        const errors = formState.errors.actions?.[index];
        return (
          <div
            key={field.key}
            className="grid gap-3 border-l-4 border-zinc pl-3 sm:grid-cols-[1fr_12rem_11rem_auto]"
          >
            <TextField
              label={`Action ${index + 1}`}
              {...register(`actions.${index}.words`)}
              error={errors?.words?.message}
            />
            <TextField label="Owner" {...register(`actions.${index}.owner`)} error={errors?.owner?.message} />
            <TextField
              label="Due"
              type="date"
              {...register(`actions.${index}.dueDate`)}
              error={errors?.dueDate?.message}
            />
            <Button
              kind="bare"
              icon={Trash2}
              className="self-end"
              aria-label={`Remove action ${index + 1}`}
              onClick={() => remove(index)}
            >
              Remove
            </Button>
          </div>
        );
      })}
      <div>
        <Button icon={Plus} onClick={() => append(newAction(watch('date')))}>
          Add an action
        </Button>
      </div>
    </fieldset>
  );
}
