import { expect, test } from 'vitest';
import fc from 'fast-check';
import {
  type DrawnSignature,
  drawnSignatureSchema,
  inkOf,
  leastInk,
  signatureSchema,
  signatureSvg,
} from '#shared/signons/signature.ts';

const coordinate = fc.integer({ min: -50, max: 5000 });
const point = fc.tuple(coordinate, coordinate, fc.integer({ min: 0, max: 3_600_000 }));
const drawn: fc.Arbitrary<DrawnSignature> = fc.record({
  width: fc.integer({ min: 50, max: 5000 }),
  height: fc.integer({ min: 50, max: 5000 }),
  strokes: fc.array(fc.array(point, { minLength: 1, maxLength: 12 }), { minLength: 1, maxLength: 6 }),
});

test('a straight stroke has as much ink as it is long, whatever the number of points on it', () => {
  const stroke = (points: [number, number, number][]) => ({ width: 300, height: 150, strokes: [points] });

  expect(
    inkOf(
      stroke([
        [0, 0, 0],
        [30, 40, 10],
      ]),
    ),
  ).toBe(50);
  expect(
    inkOf(
      stroke([
        [0, 0, 0],
        [15, 20, 5],
        [30, 40, 10],
      ]),
    ),
  ).toBe(50);
});

test('ink is never negative, and the jump between two strokes is no ink', () => {
  fc.assert(
    fc.property(drawn, (signature) => {
      const apart = signature.strokes.map((stroke) => inkOf({ ...signature, strokes: [stroke] }));
      expect(inkOf(signature)).toBeGreaterThanOrEqual(0);
      expect(inkOf(signature)).toBeCloseTo(
        apart.reduce((sum, ink) => sum + ink, 0),
        4,
      );
    }),
  );
});

test('moving a signature about changes none of its ink', () => {
  fc.assert(
    fc.property(drawn, fc.integer({ min: -500, max: 500 }), (signature, shift) => {
      const moved = {
        ...signature,
        strokes: signature.strokes.map((stroke) =>
          stroke.map(([x, y, at]): [number, number, number] => [x + shift, y - shift, at]),
        ),
      };
      expect(inkOf(moved)).toBeCloseTo(inkOf(signature), 6);
    }),
  );
});

test('a single dot holds too little ink to be a signature', () => {
  expect(inkOf({ width: 300, height: 150, strokes: [[[10, 10, 0]]] })).toBeLessThan(leastInk);
});

test('the picture starts one move for each stroke and holds every point of it', () => {
  fc.assert(
    fc.property(drawn, (signature) => {
      const svg = signatureSvg(signature);
      const path = /<path d="([^"]*)"/.exec(svg)?.[1] ?? '';
      expect(path.match(/M/g)).toHaveLength(signature.strokes.length);
      for (const [x, y] of signature.strokes.flat()) expect(path).toContain(`${x} ${y}`);
    }),
  );
});

test('the picture says nothing but drawing: no script, no reference, only numbers in its path', () => {
  fc.assert(
    fc.property(drawn, (signature) => {
      const svg = signatureSvg(signature);
      expect(svg).not.toMatch(/<script|href|on\w+=|<image|<foreignObject/i);
      expect(/<path d="([^"]*)"/.exec(svg)?.[1]).toMatch(/^[MLh0-9 .-]*$/);
      expect(svg).toContain(`viewBox="0 0 ${signature.width} ${signature.height}"`);
    }),
  );
});

test('every drawn signature of the arbitrary shape is accepted, and one without a stroke is refused in words', () => {
  fc.assert(
    fc.property(drawn, (signature) => {
      expect(drawnSignatureSchema.safeParse(signature).success).toBe(true);
    }),
  );
  const empty = drawnSignatureSchema.safeParse({ width: 300, height: 150, strokes: [] });
  expect(empty.error?.issues[0]?.message).toBe('Sign in the box.');
});

test('a fraction of a pixel, a point far outside and an unknown field are refused', () => {
  const at = (x: number) => ({ width: 300, height: 150, strokes: [[[x, 0, 0]]] });

  expect(drawnSignatureSchema.safeParse(at(0.5)).success).toBe(false);
  expect(drawnSignatureSchema.safeParse(at(5001)).success).toBe(false);
  expect(drawnSignatureSchema.safeParse({ ...at(1), colour: 'red' }).success).toBe(false);
});

test('a typed signature needs the name and a witness', () => {
  const typed = { method: 'typed', typedName: 'Ama Birdsall', witness: 'Lou Karsten' };

  expect(signatureSchema.safeParse(typed).success).toBe(true);
  expect(signatureSchema.safeParse({ ...typed, witness: ' ' }).error?.issues[0]?.message).toBe(
    'The witness writes their name.',
  );
});
