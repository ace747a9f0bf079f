import { type DrawnSignature, inkOf, leastInk } from '#shared/signons/signature.ts';

/** A point of ink: pixels in the frame it was drawn in, and the clock's milliseconds. */
export type InkPoint = { x: number; y: number; time: number };
export type Stroke = InkPoint[];
export type Size = { width: number; height: number };
/**
 * What has been drawn so far: strokes in the frame of the box as it was at the first touch. `edits` counts what changed other
 * than by drawing.
 */
export type Ink = { frame: Size | null; strokes: Stroke[]; edits: number };
export const noInk: Ink = { frame: null, strokes: [], edits: 0 };

export const withStroke = (ink: Ink, stroke: Stroke, box: Size): Ink => ({
  ...ink,
  frame: ink.frame ?? box,
  strokes: [...ink.strokes, stroke],
});
export const withoutLast = (ink: Ink): Ink => ({
  ...ink,
  strokes: ink.strokes.slice(0, -1),
  edits: ink.edits + 1,
});
export const cleared = (ink: Ink): Ink => ({ ...noInk, edits: ink.edits + 1 });

/** Uniform scale and shift from the frame to the canvas as it stands now. */
export type Fit = { scale: number; dx: number; dy: number };

/** What must be seen: the frame, and ink that went over its edge. */
export type Extent = Size & { left: number; top: number };

export function extentOf(frame: Size, strokes: Stroke[]): Extent {
  const points = strokes.flat();
  const left = Math.floor(Math.min(0, ...points.map(({ x }) => x)));
  const top = Math.floor(Math.min(0, ...points.map(({ y }) => y)));
  return {
    left,
    top,
    width: Math.ceil(Math.max(frame.width, ...points.map(({ x }) => x))) - left,
    height: Math.ceil(Math.max(frame.height, ...points.map(({ y }) => y))) - top,
  };
}

/** Lays the extent into the canvas, whole and undistorted, so that a turned phone shows the same signature. */
export function fitInto({ left, top, width, height }: Extent, canvas: Size): Fit {
  const scale = Math.min(canvas.width / width, canvas.height / height);
  return {
    scale,
    dx: (canvas.width - width * scale) / 2 - left * scale,
    dy: (canvas.height - height * scale) / 2 - top * scale,
  };
}

export const toCanvas = ({ scale, dx, dy }: Fit, { x, y, time }: InkPoint): InkPoint => ({
  x: x * scale + dx,
  y: y * scale + dy,
  time,
});

export const toFrame = ({ scale, dx, dy }: Fit, { x, y, time }: InkPoint): InkPoint => ({
  x: (x - dx) / scale,
  y: (y - dy) / scale,
  time,
});

const mostPoints = 4000;
const mostStrokes = 200;
const longest = 3_600_000;

/**
 * The signature as it is kept: whole pixels, milliseconds since the first touch. The frame grows where ink went over its
 * edge, so that no part of a signature is cut off.
 */
export function drawnSignatureOf(frame: Size, strokes: Stroke[]): DrawnSignature {
  const start = Math.min(...strokes.flat().map(({ time }) => time));
  const { left, top, width, height } = extentOf(frame, strokes);
  return {
    width: Math.max(50, width),
    height: Math.max(50, height),
    strokes: strokes
      .filter((stroke) => stroke.length > 0)
      .slice(0, mostStrokes)
      .map((stroke) =>
        thinned(stroke).map(({ x, y, time }): [number, number, number] => [
          Math.round(x - left),
          Math.round(y - top),
          Math.min(longest, Math.max(0, Math.round(time - start))),
        ]),
      ),
  };
}

/** Why these strokes are no signature yet, in words; null where they are one. */
export function inkRefusal(frame: Size, strokes: Stroke[]): string | null {
  if (strokes.length === 0) return 'Sign in the box first.';
  if (strokes.length > mostStrokes) return 'That is too many strokes to keep. Clear the box and sign once.';
  if (inkOf(drawnSignatureOf(frame, strokes)) < leastInk)
    return 'That is too little to be a signature. Sign with your whole name or your usual mark.';
  return null;
}

/** Keeps the first and last point and an even choice between them, where a stroke has more points than can be stored. */
function thinned(stroke: Stroke): Stroke {
  if (stroke.length <= mostPoints) return stroke;
  const pace = (stroke.length - 1) / (mostPoints - 1);
  return Array.from({ length: mostPoints }, (_, index) => stroke[Math.round(index * pace)] as InkPoint);
}
