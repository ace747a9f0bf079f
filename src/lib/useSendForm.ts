import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import {
  type DefaultValues,
  type FieldValues,
  type Path,
  useForm,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { Refusal } from '#shared/kernel/refusal.ts';
import { wordsOf } from './query.ts';

export type SendForm<Input extends FieldValues> = UseFormReturn<Input, unknown, unknown> & {
  /** For the form's onSubmit. */
  submit: (event?: React.BaseSyntheticEvent) => Promise<void>;
  /** What kept the form from being sent, beside what stands at the fields. */
  trouble: string | null;
  sending: boolean;
};

/** A form that checks with the shared schema and puts the server's field messages on the same inputs. What was typed stays. */
export function useSendForm<S extends z.ZodType<unknown, FieldValues>>({
  schema,
  start,
  send,
}: {
  schema: S;
  start: DefaultValues<z.input<S>>;
  send: (body: z.output<S>) => Promise<unknown>;
}): SendForm<z.input<S>> {
  type Input = z.input<S>;
  const [trouble, setTrouble] = useState<string | null>(null);
  const form = useForm<Input, unknown, z.output<S>>({
    // The resolver's own types can't follow a schema that is a type parameter.
    resolver: zodResolver(schema as never) as never,
    defaultValues: start,
  });
  const submit = form.handleSubmit(async (body) => {
    setTrouble(null);
    try {
      await send(body);
    } catch (error) {
      if (error instanceof Refusal) {
        for (const [path, message] of Object.entries(error.fields))
          form.setError(path as Path<Input>, { message });
      }
      setTrouble(wordsOf(error));
    }
  });
  return Object.assign(form, {
    submit,
    trouble,
    sending: form.formState.isSubmitting,
  });
}
