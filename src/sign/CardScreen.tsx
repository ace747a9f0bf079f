import { useEffect, useRef } from 'react';
import type { Reading } from '#shared/signons/signons.api.ts';
import { CrewCardView } from './CrewCardView.tsx';
import { OpeningCard } from './OpeningCard.tsx';
import { BigButton, Screen } from './pieces.tsx';
import { ReadAloud } from './ReadAloud.tsx';
import { spokenCard, spokenOpening } from './spoken.ts';
import { swipeOf, type Touch } from './swipe.ts';
import { useLargeType } from './useLargeType.ts';

/** One crew card with its way on and back: buttons in thumb reach, swipe, arrow keys. */
export function CardScreen({
  reading,
  index,
  changeNote,
  nextLabel,
  onNext,
  onBack,
}: {
  reading: Reading;
  /** 0 is the opening card, 1 the first step. */
  index: number;
  changeNote: string | null;
  nextLabel: string;
  onNext: () => void;
  onBack: () => void;
}) {
  const [large, setLarge] = useLargeType();
  const swipe = useSwipe(onNext, onBack);
  useArrowKeys(onNext, onBack);
  const card = index === 0 ? null : reading.cards[index - 1];
  const language = reading.declaration.language;
  return (
    <div {...swipe} className={`flex grow flex-col ${large ? 'text-[1.5rem]' : 'text-[1.125rem]'}`}>
      <Screen
        title={card ? card.title : reading.title}
        language={language}
        above={
          <>
            <Progress at={index} of={reading.cards.length} />
            <div className="mb-2 flex flex-wrap items-center gap-2 text-base">
              <ReadAloud
                key={index}
                lines={card ? spokenCard(card) : spokenOpening(reading, changeNote)}
                language={language}
              />
              <BigButton kind="quiet" aria-pressed={large} onClick={() => setLarge(!large)}>
                Large type
              </BigButton>
            </div>
          </>
        }
        actions={
          <>
            <BigButton kind="quiet" className="w-1/3 text-[1.125rem]" onClick={onBack}>
              Back
            </BigButton>
            <BigButton className="grow text-[1.125rem]" onClick={onNext}>
              {nextLabel}
            </BigButton>
          </>
        }
      >
        {card ? (
          <CrewCardView key={card.stepId} card={card} />
        ) : (
          <OpeningCard reading={reading} changeNote={changeNote} />
        )}
      </Screen>
    </div>
  );
}

function Progress({ at, of }: { at: number; of: number }) {
  return (
    <div className="mb-2 text-base">
      <p role="status" className="text-ink-soft">
        {at === 0 ? `Before the ${of === 1 ? 'step' : `${of} steps`}` : `Step ${at} of ${of}`}
      </p>
      <div aria-hidden className="mt-1 flex gap-1">
        {Array.from({ length: of }, (_, index) => (
          <span key={index} className={`h-1.5 grow ${index < at ? 'bg-chalk' : 'bg-zinc'}`} />
        ))}
      </div>
    </div>
  );
}

function useSwipe(onLeft: () => void, onRight: () => void) {
  const from = useRef<Touch | null>(null);
  return {
    onTouchStart: ({ touches, timeStamp }: React.TouchEvent) => {
      const touch = touches.length === 1 ? touches[0] : undefined;
      from.current = touch ? { x: touch.clientX, y: touch.clientY, at: timeStamp } : null;
    },
    onTouchEnd: ({ changedTouches, timeStamp }: React.TouchEvent) => {
      const touch = changedTouches[0];
      if (!from.current || !touch) return;
      const swept = swipeOf(from.current, { x: touch.clientX, y: touch.clientY, at: timeStamp });
      from.current = null;
      if (swept === 'left') onLeft();
      if (swept === 'right') onRight();
    },
  };
}

function useArrowKeys(onRight: () => void, onLeft: () => void): void {
  useEffect(() => {
    const onKey = ({ key, target, altKey, ctrlKey, metaKey }: KeyboardEvent) => {
      if (altKey || ctrlKey || metaKey) return;
      if (target instanceof HTMLElement && target.matches('input, textarea, select')) return;
      if (key === 'ArrowRight') onRight();
      if (key === 'ArrowLeft') onLeft();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [onRight, onLeft]);
}
