import { z } from 'zod';

type Range = {
  /** Smallest value allowed. */
  least?: number;
  /** Must be more than this. */
  over?: number;
  /** Largest value allowed. */
  most?: number;
  /** Must be less than this. */
  below?: number;
  whole?: boolean;
  /** Said after the limit: where it comes from. */
  why?: string;
  /** Said beside the input: how to measure it. */
  help?: string;
};

/** A number with its label, unit and limits; each refusal names the limit. */
export function quantity(label: string, unit: string, range: Range = {}) {
  const { least, over, most, below, whole, why, help } = range;
  const limit = (words: string, value: number) =>
    `${label} must be ${words} ${value}${unit === '' ? '' : ` ${unit}`}${why ? `: ${why}` : ''}.`;
  let schema = z.number({
    error: ({ input }) =>
      input === undefined
        ? `${label} is missing.`
        : `${label} must be a number${unit === '' ? '' : ` of ${unit}`}.`,
  });
  if (whole) schema = schema.int(`${label} must be a whole number.`);
  if (least !== undefined) schema = schema.min(least, limit('at least', least));
  if (over !== undefined) schema = schema.gt(over, limit('more than', over));
  if (most !== undefined) schema = schema.max(most, limit('at most', most));
  if (below !== undefined) schema = schema.lt(below, limit('less than', below));
  return schema.meta({ title: label, unit, ...(help ? { description: help } : {}) });
}

/** One of a few words. */
export const choice = <const V extends readonly [string, ...string[]]>(
  label: string,
  values: V,
  help?: string,
) =>
  z
    .enum(values, { error: `${label} must be one of ${values.join(', ')}.` })
    .meta({ title: label, ...(help ? { description: help } : {}) });

/** One of a few numbers. */
export const oneOf = <const V extends readonly [number, ...number[]]>(
  label: string,
  unit: string,
  values: V,
) =>
  z
    .literal(values, {
      error: `${label} must be one of ${values.join(', ')}${unit === '' ? '' : ` ${unit}`}.`,
    })
    .meta({ title: label, unit });

export const yesNo = (label: string, help?: string) =>
  z
    .boolean({ error: `${label}: say true or false.` })
    .meta({ title: label, ...(help ? { description: help } : {}) });

/** A list of rows or numbers, so long. */
export const list = <T extends z.ZodType>(label: string, item: T, least: number, most: number) =>
  z
    .array(item, { error: `${label} must be a list.` })
    .min(least, `${label}: give at least ${least}.`)
    .max(most, `${label}: give at most ${most}.`)
    .meta({ title: label });

/** What a row is called in the reading: “grinder”. */
export const rowName = z
  .string({ error: 'Name must be words.' })
  .trim()
  .min(1, 'Name must not be empty.')
  .max(60, 'Name must be at most 60 characters.')
  .optional()
  .meta({ title: 'Name' });

/** A number in a result. */
export const outcome = (label: string, unit = '') => z.number().meta({ title: label, unit });

/** A number in a result that may not apply. */
export const outcomeOrNone = (label: string, unit = '') => z.number().nullable().meta({ title: label, unit });

export const verdict = (label: string) => z.boolean().meta({ title: label });

/** Sentences that belong beside the result wherever it is shown. */
export const warnings = z.array(z.string()).meta({ title: 'Mind' });
