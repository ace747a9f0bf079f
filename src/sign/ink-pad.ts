import SignaturePad, { type PointGroup } from 'signature_pad';
import {
  extentOf,
  type Fit,
  fitInto,
  type Ink,
  type Size,
  type Stroke,
  toCanvas,
  toFrame,
} from './strokes.ts';

const pen: Omit<PointGroup, 'points'> = {
  penColor: '#1A2226',
  dotSize: 2.5,
  minWidth: 1.2,
  maxWidth: 3,
  velocityFilterWeight: 0.7,
  compositeOperation: 'source-over',
};

export type InkPad = {
  /**
   * Draws the strokes anew, laid into the box as it stands. Not after each stroke, which the pad has drawn itself: a next stroke
   * that has begun meanwhile would be lost.
   */
  show: (ink: Ink) => void;
  close: () => void;
};

/** A canvas to sign on. Null where the browser gives no drawing surface: the typed signature is the way then. */
export function openInkPad(
  box: HTMLCanvasElement,
  onStroke: (stroke: Stroke, size: Size) => void,
): InkPad | null {
  if (!box.getContext('2d')) return null;
  const pad = new SignaturePad(box, { ...pen, minDistance: 2 });
  let fit: Fit = { scale: 1, dx: 0, dy: 0 };
  const size = () => ({ width: box.clientWidth, height: box.clientHeight });
  const onEnd = () => {
    const points = pad.toData().at(-1)?.points ?? [];
    if (points.length > 0)
      onStroke(
        points.map(({ x, y, time }) => toFrame(fit, { x, y, time })),
        size(),
      );
  };
  pad.addEventListener('endStroke', onEnd);
  return {
    show({ frame, strokes }) {
      fitCanvas(box, size());
      fit = fitInto(extentOf(frame ?? size(), strokes), size());
      const shown = fit;
      pad.fromData(strokes.map((stroke) => groupOf(stroke.map((point) => toCanvas(shown, point)))));
    },
    close() {
      pad.off();
      pad.removeEventListener('endStroke', onEnd);
    },
  };
}

/** Gives the canvas as many dots as the screen has under it. */
function fitCanvas(box: HTMLCanvasElement, { width, height }: Size): void {
  const ratio = Math.max(1, window.devicePixelRatio);
  box.width = Math.round(width * ratio);
  box.height = Math.round(height * ratio);
  box.getContext('2d')?.scale(ratio, ratio);
}

const groupOf = (stroke: Stroke): PointGroup => ({
  ...pen,
  points: stroke.map((point) => ({ ...point, pressure: 0.5 })),
});
