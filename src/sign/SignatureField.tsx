import { useEffect, useRef, useState } from 'react';
import SignaturePad, { type PointGroup } from 'signature_pad';
import { BigButton, Trouble } from './pieces.tsx';
import {
  extentOf,
  type Fit,
  fitInto,
  type Ink,
  noInk,
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

/** A box to sign in. The strokes are the truth and the canvas only shows them, so that they survive a turned phone. */
export function SignatureField({
  ink,
  onInk,
  trouble,
}: {
  ink: Ink;
  onInk: (ink: Ink) => void;
  trouble: string | null;
}) {
  const canvas = useRef<HTMLCanvasElement>(null);
  usePad(canvas, ink, onInk);
  const count = ink.strokes.length;
  return (
    <div>
      <div className="flex flex-col gap-2 landscape:flex-row">
        <div className="relative grow rounded-[3px] border-2 border-edge">
          <canvas
            ref={canvas}
            role="img"
            aria-label={count === 0 ? 'Box to sign in, empty' : `Box to sign in, ${strokesInWords(count)}`}
            aria-describedby="signature-trouble"
            className="block h-[clamp(130px,38dvh,240px)] w-full touch-none bg-[#ffffff]"
          />
          <span
            aria-hidden
            className="pointer-events-none absolute inset-x-4 bottom-8 border-b border-[#7C878C]"
          />
          {count === 0 && (
            <span aria-hidden className="pointer-events-none absolute bottom-9 left-4 text-[#556067]">
              Sign here with a finger
            </span>
          )}
        </div>
        <div className="flex gap-2 landscape:flex-col">
          <BigButton
            kind="quiet"
            disabled={count === 0}
            onClick={() => onInk({ ...ink, strokes: ink.strokes.slice(0, -1) })}
          >
            Undo
          </BigButton>
          <BigButton kind="quiet" disabled={count === 0} onClick={() => onInk(noInk)}>
            Clear
          </BigButton>
        </div>
      </div>
      <Trouble id="signature-trouble" words={trouble} />
    </div>
  );
}

const strokesInWords = (count: number) => (count === 1 ? '1 stroke drawn' : `${count} strokes drawn`);

function usePad(
  canvas: React.RefObject<HTMLCanvasElement | null>,
  ink: Ink,
  onInk: (ink: Ink) => void,
): void {
  const pad = useRef<SignaturePad | null>(null);
  const size = useSizeOf(canvas);
  const fit = useRef<Fit>({ scale: 1, dx: 0, dy: 0 });
  const latest = useRef({ ink, onInk, size });
  useEffect(() => {
    latest.current = { ink, onInk, size };
  });
  useEffect(() => {
    const box = canvas.current;
    // Without a drawing surface the typed signature is the way.
    if (!box?.getContext('2d')) return;
    const created = new SignaturePad(box, { ...pen, minDistance: 2 });
    const onStroke = () => {
      const { ink: before, onInk: tell, size: canvasSize } = latest.current;
      const points = created.toData().at(-1)?.points;
      if (!points || !canvasSize) return;
      const frame = before.frame ?? canvasSize;
      const stroke = points.map(({ x, y, time }) => toFrame(fit.current, { x, y, time }));
      const after = { frame, strokes: [...before.strokes, stroke] };
      latest.current = { ...latest.current, ink: after };
      tell(after);
    };
    created.addEventListener('endStroke', onStroke);
    pad.current = created;
    return () => {
      created.off();
      created.removeEventListener('endStroke', onStroke);
      pad.current = null;
    };
  }, [canvas]);
  useEffect(() => {
    const box = canvas.current;
    if (!box || !size || !pad.current) return;
    const resized = fitCanvas(box, size);
    if (!resized && pad.current.toData().length === ink.strokes.length) return;
    // What is drawn keeps its place while the box keeps its size, even where a stroke went over the edge.
    if (resized || ink.strokes.length === 0)
      fit.current = fitInto(extentOf(ink.frame ?? size, ink.strokes), size);
    const shown = fit.current;
    pad.current.fromData(ink.strokes.map((stroke) => groupOf(stroke.map((point) => toCanvas(shown, point)))));
  }, [canvas, ink, size]);
}

/** Gives the canvas as many dots as the screen has under it; false where it has them already. Setting the size wipes it. */
function fitCanvas(box: HTMLCanvasElement, { width, height }: Size): boolean {
  const ratio = Math.max(1, window.devicePixelRatio);
  if (box.width === Math.round(width * ratio) && box.height === Math.round(height * ratio)) return false;
  box.width = Math.round(width * ratio);
  box.height = Math.round(height * ratio);
  box.getContext('2d')?.scale(ratio, ratio);
  return true;
}

const groupOf = (stroke: Stroke): PointGroup => ({
  ...pen,
  points: stroke.map((point) => ({ ...point, pressure: 0.5 })),
});

function useSizeOf(canvas: React.RefObject<HTMLCanvasElement | null>): Size | null {
  const [size, setSize] = useState<Size | null>(null);
  useEffect(() => {
    const box = canvas.current;
    if (!box) return;
    const observer = new ResizeObserver(() => {
      if (box.clientWidth > 0 && box.clientHeight > 0)
        setSize({ width: box.clientWidth, height: box.clientHeight });
    });
    observer.observe(box);
    return () => observer.disconnect();
  }, [canvas]);
  return size;
}
