import { z } from 'zod';
import { Refusal } from '../kernel/refusal.ts';

export const verificationNames = [
  'law',
  'regulator',
  'secondary',
  'memory',
  'practice',
  'arithmetic',
] as const;
export type Verification = (typeof verificationNames)[number];

/** How a source was checked. A table marked `memory` is to be confirmed before anyone relies on it. */
export const verifications: Record<Verification, string> = {
  law: 'read in the text of the law',
  regulator: 'read in the agency’s own page or data',
  secondary: 'read in another’s copy, not at the publisher',
  memory: 'not verified: confirm before relying on it',
  practice: 'common practice, no source',
  arithmetic: 'geometry or arithmetic, nothing to look up',
};

export type FigureSource = { title: string; locator: string; verified: Verification };

type About = {
  id: string;
  title: string;
  /** Raised whenever the same input could give another result. */
  version: number;
  summary: string;
  formula: string;
  /** What the inputs may be and what the figure leaves out, in plain words. */
  limits: readonly string[];
  caution: string;
  sources: readonly FigureSource[];
};

type Schemas<I extends z.ZodObject, O extends z.ZodObject> = { input: I; output: O };

type Words<I extends z.ZodObject, O extends z.ZodObject> = {
  /** The result in a framer's words. Takes the input as `workOut` returns it, defaults filled in. */
  reading(input: z.output<I>, result: z.output<O>): string;
  /** One sentence for each limit that the result is over; empty where all is within. */
  over(input: z.output<I>, result: z.output<O>): string[];
};

/** A sum that people rely on: the same on a screen, in a statement, on paper and on the command line. */
export type Figure<I extends z.ZodObject = z.ZodObject, O extends z.ZodObject = z.ZodObject> = About &
  Schemas<I, O> &
  Words<I, O> & {
    /** Unrounded. Input that does not fit is refused with the limit named; a result is never NaN or infinite. */
    compute(given: unknown): z.output<O>;
  };

/** Makes a figure of its parts; `calculate` sees only input that fits the schema. */
export function defineFigure<I extends z.ZodObject, O extends z.ZodObject>({
  calculate,
  ...parts
}: About & Schemas<I, O> & Words<I, O> & { calculate: (input: z.output<I>) => z.output<O> }): Figure<I, O> {
  return {
    ...parts,
    compute: (given) => {
      const result = parts.output.safeParse(calculate(parseInput(parts.input, given)));
      if (!result.success)
        throw new Refusal('invalid', 'These numbers lead outside what this figure can work out.');
      return result.data;
    },
  };
}

/** The input with its defaults, the result and what to say about it. Refuses as `compute` does. */
export function workOut<I extends z.ZodObject, O extends z.ZodObject>(figure: Figure<I, O>, given: unknown) {
  const input = parseInput(figure.input, given);
  const result = figure.compute(input);
  return { input, result, reading: figure.reading(input, result), over: figure.over(input, result) };
}

/** Refuses one input by name, for limits that hang on another input or on a table. */
export const refuseInput = (field: string, message: string): Refusal =>
  new Refusal('invalid', message, { fields: { [field]: message } });

const notNamed = 'Give the inputs as named values.';

function parseInput<I extends z.ZodObject>(schema: I, given: unknown): z.output<I> {
  const parsed = schema.safeParse(given);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) {
    const path = issue.path.join('.');
    if (issue.code === 'invalid_type' && issue.expected === 'object')
      fields[path] = path === '' ? notNamed : `${path} must be a set of named values.`;
    else if (issue.code !== 'unrecognized_keys') fields[path] ??= issue.message;
    else
      for (const key of issue.keys) fields[[...issue.path, key].join('.')] = `This figure takes no “${key}”.`;
  }
  const [first = notNamed, ...others] = Object.values(fields);
  const message = others.length === 0 ? first : `${first} (and ${others.length} more)`;
  throw new Refusal('invalid', message, { fields });
}
