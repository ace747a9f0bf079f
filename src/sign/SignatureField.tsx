import { type Dispatch, type RefObject, type SetStateAction, useEffect, useRef } from 'react';
import { type InkPad, openInkPad } from './ink-pad.ts';
import { BigButton, Trouble } from './pieces.tsx';
import { cleared, type Ink, withoutLast, withStroke } from './strokes.ts';

/** A box to sign in. The strokes are the truth and the canvas only shows them, so that they survive a turned phone. */
export function SignatureField({
  ink,
  onInk,
  trouble,
}: {
  ink: Ink;
  onInk: Dispatch<SetStateAction<Ink>>;
  trouble: string | null;
}) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useInkPad(canvas, ink, onInk);
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
          <BigButton kind="quiet" disabled={count === 0} onClick={() => onInk(withoutLast)}>
            Undo
          </BigButton>
          <BigButton kind="quiet" disabled={count === 0} onClick={() => onInk(cleared)}>
            Clear
          </BigButton>
        </div>
      </div>
      <Trouble id="signature-trouble" words={trouble} />
    </div>
  );
}

const strokesInWords = (count: number) => (count === 1 ? '1 stroke drawn' : `${count} strokes drawn`);

/** Opens the pad on the canvas, gathers its strokes, and draws them anew when the box is turned or a stroke is taken back. */
function useInkPad(
  canvas: RefObject<HTMLCanvasElement | null>,
  ink: Ink,
  onInk: Dispatch<SetStateAction<Ink>>,
): void {
  const pad = useRef<InkPad | null>(null);
  const latest = useRef(ink);
  useEffect(() => {
    latest.current = ink;
  }, [ink]);
  useEffect(() => {
    const box = canvas.current;
    if (!box) return;
    const opened = openInkPad(box, (stroke, size) => onInk((before) => withStroke(before, stroke, size)));
    pad.current = opened;
    const observer = new ResizeObserver(() => box.clientWidth > 0 && opened?.show(latest.current));
    observer.observe(box);
    return () => {
      observer.disconnect();
      opened?.close();
      pad.current = null;
    };
  }, [canvas, onInk]);
  useEffect(() => {
    pad.current?.show(latest.current);
  }, [ink.edits]);
}
