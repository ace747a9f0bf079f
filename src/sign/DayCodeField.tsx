import { inputClass, Labelled } from './pieces.tsx';

/** The four digits that keep strangers out. */
export function DayCodeField({
  value,
  onChange,
  trouble,
}: {
  value: string;
  onChange: (dayCode: string) => void;
  trouble: string | null;
}) {
  return (
    <Labelled
      id="day-code"
      label="Day code"
      help="Four digits, new each day. Your supervisor has it, and it stands on the site board."
      trouble={trouble}
    >
      <input
        id="day-code"
        className={`${inputClass} max-w-40 tracking-[0.4em]`}
        inputMode="numeric"
        autoComplete="off"
        maxLength={4}
        required
        aria-describedby="day-code-help day-code-trouble"
        aria-invalid={trouble !== null}
        value={value}
        onChange={({ target }) => onChange(target.value.replace(/\D/g, '').slice(0, 4))}
      />
    </Labelled>
  );
}
