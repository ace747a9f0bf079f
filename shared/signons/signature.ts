import { z } from 'zod';

/** One stroke: points as whole CSS pixels and milliseconds since the first touch. */
const strokeSchema = z
  .array(
    z.tuple([
      z.number().int().min(-50).max(5000),
      z.number().int().min(-50).max(5000),
      z.number().int().min(0).max(3_600_000),
    ]),
  )
  .min(1)
  .max(4000);

export const drawnSignatureSchema = z.strictObject({
  width: z.number().int().min(50).max(5000),
  height: z.number().int().min(50).max(5000),
  strokes: z.array(strokeSchema).min(1, 'Sign in the box.').max(200),
});
export type DrawnSignature = z.infer<typeof drawnSignatureSchema>;

/** Pixels of line below which ink is no signature: about the length of two short letters. */
export const leastInk = 60;

/** Length of all strokes together, in CSS pixels. */
export function inkOf({ strokes }: DrawnSignature): number {
  let length = 0;
  for (const stroke of strokes)
    for (let index = 1; index < stroke.length; index += 1) {
      const [x, y] = stroke[index] ?? [0, 0];
      const [fromX, fromY] = stroke[index - 1] ?? [0, 0];
      length += Math.hypot(x - fromX, y - fromY);
    }
  return length;
}

/** The signature as a stand-alone SVG picture, drawn from the strokes and nothing else. */
export function signatureSvg({ width, height, strokes }: DrawnSignature): string {
  const paths = strokes.map((stroke) => {
    const [first, ...rest] = stroke;
    if (!first) return '';
    if (rest.length === 0) return `M${first[0]} ${first[1]}h.1`;
    return `M${first[0]} ${first[1]}L${rest.map(([x, y]) => `${x} ${y}`).join(' ')}`;
  });
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" role="img" aria-label="Signature">` +
    `<path d="${paths.join('')}" fill="none" stroke="currentColor" stroke-width="2.5" stroke-linecap="round" stroke-linejoin="round"/></svg>`
  );
}

/**
 * How somebody signed: drawn with a finger, or typed before a witness for whoever can't draw. Simple electronic signatures in the
 * sense of the electronic transactions acts; never called advanced.
 */
export const signatureSchema = z.discriminatedUnion('method', [
  z.strictObject({ method: z.literal('drawn'), drawn: drawnSignatureSchema }),
  z.strictObject({
    method: z.literal('typed'),
    typedName: z.string().trim().min(2, 'Type your name.').max(120),
    witness: z.string().trim().min(2, 'The witness writes their name.').max(120),
  }),
]);
export type Signature = z.infer<typeof signatureSchema>;
