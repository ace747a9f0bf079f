import { useState } from 'react';
import { controlsShownFirst } from '#shared/signons/cards.ts';
import { BigButton, Section } from './pieces.tsx';
import type { Card } from './spoken.ts';

/** One step as a worker reads it: what can hurt you, when to stop, what we do. */
export function CrewCardView({ card }: { card: Card }) {
  return (
    <>
      {card.words.map((line) => (
        <p key={line} className="mb-2">
          {line}
        </p>
      ))}
      {card.hurts.length > 0 && (
        <Section title="What can hurt you">
          <Lines lines={card.hurts} />
        </Section>
      )}
      {card.stopIf.length > 0 && (
        <section className="mt-5 border-l-8 border-oxide bg-sheet py-3 pl-3 pr-2">
          <h2 className="mb-2 font-semibold text-oxide">Stop if</h2>
          <Lines lines={card.stopIf} />
        </section>
      )}
      {card.holdPoints.length > 0 && (
        <section className="mt-5 border-l-8 border-line bg-sheet py-3 pl-3 pr-2">
          <h2 className="mb-2 font-semibold text-line">Hold point: do not go past until it is released</h2>
          <Lines lines={card.holdPoints} />
        </section>
      )}
      {card.controls.length > 0 && <Controls controls={card.controls} />}
      {card.protective.length > 0 && (
        <Section title="Wear">
          <Lines lines={card.protective} />
        </Section>
      )}
    </>
  );
}

function Lines({ lines }: { lines: string[] }) {
  return (
    <ul className="list-disc space-y-2 pl-6">
      {lines.map((line) => (
        <li key={line}>{line}</li>
      ))}
    </ul>
  );
}

function Controls({ controls }: Pick<Card, 'controls'>) {
  const [all, setAll] = useState(false);
  const shown = all ? controls : controls.slice(0, controlsShownFirst);
  const hidden = controls.length - shown.length;
  return (
    <Section title="What we do">
      <ul className="list-disc space-y-2 pl-6">
        {shown.map(({ text, role }, index) => (
          <li key={`${index}${text}`}>
            {text}
            {role && <span className="text-ink-soft"> ({role})</span>}
          </li>
        ))}
      </ul>
      {controls.length > controlsShownFirst && (
        <BigButton kind="quiet" className="mt-3" aria-expanded={all} onClick={() => setAll(!all)}>
          {all ? 'Show the first few' : `Show ${hidden} more`}
        </BigButton>
      )}
    </Section>
  );
}
