import { z } from 'zod';

export const bands = ['low', 'moderate', 'high', 'extreme'] as const;
export type Band = (typeof bands)[number];

export const bandNames: Record<Band, string> = {
  low: 'Low',
  moderate: 'Moderate',
  high: 'High',
  extreme: 'Extreme',
};

/** A likelihood (letter of a row) and a consequence (number of a column) on the organisation's matrix. */
export const ratingSchema = z.strictObject({
  likelihood: z.string().regex(/^[A-Z]$/),
  consequence: z.number().int().min(1).max(9),
});
export type Rating = z.infer<typeof ratingSchema>;

const scaleRow = z.strictObject({ name: z.string().min(1), meaning: z.string().min(1) });

/**
 * A risk matrix as data. Rows run from the most likely to the least, columns from the slightest consequence to the worst;
 * `cells[row][column]` is the band.
 */
export const matrixSchema = z
  .strictObject({
    format: z.literal(1),
    id: z.string().regex(/^[a-z0-9-]+$/),
    name: z.string().min(1),
    source: z.string().min(1),
    likelihoods: z
      .array(scaleRow.extend({ key: z.string().regex(/^[A-Z]$/) }))
      .min(3)
      .max(7),
    consequences: z
      .array(scaleRow.extend({ key: z.number().int() }))
      .min(3)
      .max(7),
    cells: z.array(z.array(z.enum(bands))),
    /** What must happen before work goes on in a band, and who may accept it. */
    acceptance: z.record(z.enum(bands), z.string().min(1)),
  })
  .refine(
    ({ likelihoods, consequences, cells }) =>
      cells.length === likelihoods.length && cells.every((row) => row.length === consequences.length),
    'The cells do not fill the matrix.',
  );
export type Matrix = z.infer<typeof matrixSchema>;

/** The band of a rating, or null where the matrix has no such row or column. */
export function bandOf(matrix: Matrix, { likelihood, consequence }: Rating): Band | null {
  const row = matrix.likelihoods.findIndex(({ key }) => key === likelihood);
  const column = matrix.consequences.findIndex(({ key }) => key === consequence);
  return matrix.cells[row]?.[column] ?? null;
}

/** Negative when `a` is the lesser risk, 0 when the bands are equal, positive when it is the greater. */
export const compareBands = (a: Band, b: Band): number => bands.indexOf(a) - bands.indexOf(b);
