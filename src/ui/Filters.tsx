import { type ReactNode, useEffect, useId, useState } from 'react';
import { type Choice, inputLook } from './Field.tsx';

/** A row of filters over a register. */
export function Filters({ children }: { children: ReactNode }) {
  return (
    <div role="search" className="no-print mb-4 grid grid-cols-2 gap-3 sm:flex sm:flex-wrap">
      {children}
    </div>
  );
}

type FilterProps = {
  label: string;
  value: string | undefined;
  onChange: (value: string | undefined) => void;
};

export function FilterSelect({
  label,
  value,
  onChange,
  choices,
  empty,
}: FilterProps & { choices: Choice[]; empty: string }) {
  const id = useId();
  return (
    <div className="sm:w-48">
      <label htmlFor={id} className="text-sm text-ink-soft">
        {label}
      </label>
      <select
        id={id}
        className={inputLook}
        value={value ?? ''}
        onChange={(event) => onChange(event.target.value || undefined)}
      >
        <option value="">{empty}</option>
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value}>
            {choice.label}
          </option>
        ))}
      </select>
    </div>
  );
}

const pause = 250;

/** What is typed goes into the URL after a short pause, so that each key does not ask the server. */
export function FilterSearch({ label, value, onChange }: FilterProps) {
  const id = useId();
  const [text, setText] = useState(value ?? '');
  useEffect(() => {
    if (text === (value ?? '')) return;
    const timer = setTimeout(() => onChange(text || undefined), pause);
    return () => clearTimeout(timer);
  }, [text, value, onChange]);
  return (
    <div className="sm:w-56">
      <label htmlFor={id} className="text-sm text-ink-soft">
        {label}
      </label>
      <input
        id={id}
        type="search"
        className={inputLook}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
    </div>
  );
}

export function FilterDate({ label, value, onChange }: FilterProps) {
  const id = useId();
  return (
    <div className="sm:w-44">
      <label htmlFor={id} className="text-sm text-ink-soft">
        {label}
      </label>
      <input
        id={id}
        type="date"
        className={inputLook}
        value={value ?? ''}
        onChange={(event) => onChange(event.target.value || undefined)}
      />
    </div>
  );
}
