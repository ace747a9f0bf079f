import fc from 'fast-check';
import { expect, test } from 'vitest';
import { drawnSignatureSchema } from '#shared/signons/signature.ts';
import {
  drawnSignatureOf,
  extentOf,
  fitInto,
  inkRefusal,
  type Stroke,
  toCanvas,
  toFrame,
} from '../../../src/sign/strokes.ts';
import { swipeOf } from '../../../src/sign/swipe.ts';

const size = fc.record({
  width: fc.integer({ min: 100, max: 1200 }),
  height: fc.integer({ min: 100, max: 800 }),
});
const point = fc.record({
  x: fc.double({ min: -40, max: 1300, noNaN: true }),
  y: fc.double({ min: -40, max: 900, noNaN: true }),
  time: fc.integer({ min: 1_700_000_000_000, max: 1_700_000_600_000 }),
});
const strokes = fc.array(fc.array(point, { minLength: 1, maxLength: 10 }), { minLength: 1, maxLength: 5 });

test('turning the phone and turning it back leaves every point where it was drawn', () => {
  fc.assert(
    fc.property(size, size, strokes, (frame, canvas, ink) => {
      const fit = fitInto(extentOf(frame, ink), canvas);
      for (const drawn of ink.flat()) {
        const there = toFrame(fit, toCanvas(fit, drawn));
        expect(there.x).toBeCloseTo(drawn.x, 6);
        expect(there.y).toBeCloseTo(drawn.y, 6);
        expect(there.time).toBe(drawn.time);
      }
    }),
  );
});

test('all ink lies within the turned canvas, undistorted, also where it went over the edge before', () => {
  fc.assert(
    fc.property(size, size, strokes, (frame, canvas, ink) => {
      const fit = fitInto(extentOf(frame, ink), canvas);
      for (const drawn of ink.flat()) {
        const { x, y } = toCanvas(fit, drawn);
        expect(x).toBeGreaterThanOrEqual(-1e-6);
        expect(y).toBeGreaterThanOrEqual(-1e-6);
        expect(x).toBeLessThanOrEqual(canvas.width + 1e-6);
        expect(y).toBeLessThanOrEqual(canvas.height + 1e-6);
      }
    }),
  );
});

test('an empty box of the same size is shown as it is', () => {
  const box = { width: 320, height: 160 };

  expect(fitInto(extentOf(box, []), box)).toEqual({ scale: 1, dx: 0, dy: 0 });
});

test('whatever was drawn, what is kept fits the contract and no point lies outside its frame', () => {
  fc.assert(
    fc.property(size, strokes, (frame, ink) => {
      const kept = drawnSignatureOf(frame, ink);
      expect(drawnSignatureSchema.safeParse(kept).success).toBe(true);
      for (const [x, y, at] of kept.strokes.flat()) {
        expect(x).toBeGreaterThanOrEqual(0);
        expect(x).toBeLessThanOrEqual(kept.width);
        expect(y).toBeGreaterThanOrEqual(0);
        expect(y).toBeLessThanOrEqual(kept.height);
        expect(at).toBeGreaterThanOrEqual(0);
      }
      expect(Math.min(...kept.strokes.flat().map(([, , at]) => at))).toBe(0);
    }),
  );
});

test('a stroke with more points than can be stored keeps its ends and stays within the contract', () => {
  const long: Stroke = Array.from({ length: 9001 }, (_, index) => ({
    x: index / 30,
    y: 20,
    time: 1000 + index,
  }));
  const kept = drawnSignatureOf({ width: 320, height: 160 }, [long]);

  expect(drawnSignatureSchema.safeParse(kept).success).toBe(true);
  expect(kept.strokes[0]?.[0]).toEqual([0, 20, 0]);
  expect(kept.strokes[0]?.at(-1)).toEqual([300, 20, 9000]);
});

test('an empty box, a dot and a scribble without end are refused in words; a signature is not', () => {
  const frame = { width: 320, height: 160 };
  const line = (length: number): Stroke => [
    { x: 10, y: 10, time: 0 },
    { x: 10 + length, y: 10, time: 300 },
  ];

  expect(inkRefusal(frame, [])).toMatch(/Sign in the box/);
  expect(inkRefusal(frame, [line(20)])).toMatch(/too little/);
  expect(inkRefusal(frame, Array<Stroke>(201).fill(line(5)))).toMatch(/too many/);
  expect(inkRefusal(frame, [line(140)])).toBeNull();
});

test('a quick sweep across is a swipe; a scroll, a tap and a slow drag are not', () => {
  const from = { x: 200, y: 300, at: 0 };

  expect(swipeOf(from, { x: 90, y: 310, at: 200 })).toBe('left');
  expect(swipeOf(from, { x: 290, y: 310, at: 200 })).toBe('right');
  expect(swipeOf(from, { x: 120, y: 200, at: 200 })).toBeNull();
  expect(swipeOf(from, { x: 195, y: 300, at: 100 })).toBeNull();
  expect(swipeOf(from, { x: 60, y: 300, at: 1500 })).toBeNull();
});
