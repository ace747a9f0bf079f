import {
  type InputHTMLAttributes,
  type ReactNode,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
  useId,
} from 'react';

export const inputLook =
  'w-full rounded border border-edge bg-sheet text-ink px-3 min-h-10 pointer-coarse:min-h-12 aria-invalid:border-oxide aria-invalid:border-2';

type Labelled = { label: string; help?: string | undefined; error?: string | undefined };

/** Label above, help under it, the error beside the field in words. */
function Frame({ label, help, error, id, children }: Labelled & { id: string; children: ReactNode }) {
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="font-medium">
        {label}
      </label>
      {help ? (
        <p id={`${id}-help`} className="text-sm text-ink-soft">
          {help}
        </p>
      ) : null}
      {children}
      {error ? (
        <p id={`${id}-error`} className="text-sm text-oxide">
          {error}
        </p>
      ) : null}
    </div>
  );
}

const described = (id: string, help?: string, error?: string) =>
  [help ? `${id}-help` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined;

export function TextField({
  label,
  help,
  error,
  className = '',
  ...rest
}: Labelled & InputHTMLAttributes<HTMLInputElement>) {
  const id = useId();
  return (
    <Frame label={label} help={help} error={error} id={id}>
      <input
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described(id, help, error)}
        className={`${inputLook} ${className}`}
      />
    </Frame>
  );
}

export function TextArea({
  label,
  help,
  error,
  ...rest
}: Labelled & TextareaHTMLAttributes<HTMLTextAreaElement>) {
  const id = useId();
  return (
    <Frame label={label} help={help} error={error} id={id}>
      <textarea
        rows={3}
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described(id, help, error)}
        className={`${inputLook} py-2`}
      />
    </Frame>
  );
}

export type Choice = { value: string; label: string };

export function SelectField({
  label,
  help,
  error,
  choices,
  empty,
  ...rest
}: Labelled & { choices: Choice[]; empty?: string } & SelectHTMLAttributes<HTMLSelectElement>) {
  const id = useId();
  return (
    <Frame label={label} help={help} error={error} id={id}>
      <select
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described(id, help, error)}
        className={inputLook}
      >
        {empty === undefined ? null : <option value="">{empty}</option>}
        {choices.map(({ value, label: words }) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
    </Frame>
  );
}

export function CheckField({ label, help, ...rest }: Labelled & InputHTMLAttributes<HTMLInputElement>) {
  const id = useId();
  return (
    <div className="flex gap-3 items-start min-h-10 py-1">
      <input
        {...rest}
        type="checkbox"
        id={id}
        aria-describedby={described(id, help)}
        className="mt-1 size-5 shrink-0 accent-chalk"
      />
      <div>
        <label htmlFor={id}>{label}</label>
        {help ? (
          <p id={`${id}-help`} className="text-sm text-ink-soft">
            {help}
          </p>
        ) : null}
      </div>
    </div>
  );
}
