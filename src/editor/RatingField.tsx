import { useId } from 'react';
import { type Rating, ratingSchema } from '#shared/risk/matrix.ts';
import { inputLook } from '../ui/Field.tsx';
import { RiskBand } from '../ui/RiskBand.tsx';
import { useSurroundings } from './StatementContext.ts';

/** Likelihood and consequence in the words of the organisation's matrix, with the band that comes of them. */
export function RatingField({
  label,
  rating: given,
  onChange,
}: {
  label: string;
  rating: unknown;
  onChange: (rating: Rating | null) => void;
}) {
  const id = useId();
  const { matrix } = useSurroundings();
  const rating = ratingSchema.safeParse(given).data ?? null;
  const pick = (change: Partial<Rating>) =>
    onChange({
      likelihood: change.likelihood ?? rating?.likelihood ?? matrix.likelihoods[0]?.key ?? 'A',
      consequence: change.consequence ?? rating?.consequence ?? matrix.consequences.at(-1)?.key ?? 5,
    });
  return (
    <fieldset className="flex flex-col gap-1">
      <legend className="flex items-center gap-2 font-medium">
        {label} <RiskBand rating={rating} matrix={matrix} />
      </legend>
      <label htmlFor={`${id}-likelihood`} className="text-sm text-ink-soft">
        Likelihood
      </label>
      <select
        id={`${id}-likelihood`}
        className={inputLook}
        value={rating?.likelihood ?? ''}
        onChange={(event) => pick({ likelihood: event.target.value })}
      >
        {rating ? null : <option value="">Choose</option>}
        {matrix.likelihoods.map(({ key, name, meaning }) => (
          <option key={key} value={key}>{`${key} ${name}: ${meaning}`}</option>
        ))}
      </select>
      <label htmlFor={`${id}-consequence`} className="text-sm text-ink-soft">
        Consequence
      </label>
      <select
        id={`${id}-consequence`}
        className={inputLook}
        value={rating?.consequence ?? ''}
        onChange={(event) => pick({ consequence: Number(event.target.value) })}
      >
        {rating ? null : <option value="">Choose</option>}
        {matrix.consequences.map(({ key, name, meaning }) => (
          <option key={key} value={key}>{`${key} ${name}: ${meaning}`}</option>
        ))}
      </select>
    </fieldset>
  );
}
