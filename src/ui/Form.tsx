import type { FieldValues } from 'react-hook-form';
import { type ReactNode, useEffect, useRef } from 'react';
import type { SendForm } from '../lib/useSendForm.ts';
import { Button } from './Button.tsx';

type FormProps<Input extends FieldValues> = {
  form: SendForm<Input>;
  act: string;
  children: ReactNode;
  extra?: ReactNode;
};

/** The frame of a form: what is wrong as a list at the top that takes the focus, the fields, the one filled button. */
export function Form<Input extends FieldValues>({ form, act, children, extra }: FormProps<Input>) {
  const summary = useRef<HTMLDivElement>(null);
  const { errors, submitCount } = form.formState;
  const messages = messagesOf(errors);
  useEffect(() => {
    if (submitCount > 0) summary.current?.focus();
  }, [submitCount, form.trouble]);
  return (
    <form noValidate onSubmit={(event) => void form.submit(event)} className="flex flex-col gap-4">
      {messages.length > 0 || form.trouble ? (
        <div ref={summary} tabIndex={-1} role="alert" className="border-l-4 border-oxide bg-sheet px-4 py-2">
          <ul>
            {[...new Set([form.trouble ?? '', ...messages])].filter(Boolean).map((message) => (
              <li key={message}>{message}</li>
            ))}
          </ul>
        </div>
      ) : null}
      {children}
      <div className="flex flex-wrap gap-2">
        <Button type="submit" kind="filled" busy={form.sending}>
          {act}
        </Button>
        {extra}
      </div>
    </form>
  );
}

function messagesOf(errors: object): string[] {
  return Object.values(errors).flatMap((error: unknown): string[] => {
    if (typeof error !== 'object' || error === null) return [];
    const { message } = error as { message?: unknown };
    return typeof message === 'string' ? [message] : Array.isArray(error) ? messagesOf(error) : [];
  });
}
