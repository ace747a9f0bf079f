import type { Frozen } from '../statements/frozen.ts';
import type { OutlineStep } from '../statements/document/outline.ts';
import { controlTier } from '../library/block.ts';

/** One step as a worker reads it. */
export type CrewCard = {
  stepId: string;
  number: number;
  title: string;
  /** The plain-words summary of the step. */
  words: string[];
  hurts: string[];
  /** What we do, highest level of control first. */
  controls: { text: string; level: string; role: string }[];
  stopIf: string[];
  holdPoints: string[];
  protective: string[];
};

/** The statement as a worker reads it: one step a card. */
export function crewCardsOf({ outline }: Pick<Frozen, 'outline'>): CrewCard[] {
  return outline.steps.map(cardOf);
}

function cardOf(step: OutlineStep): CrewCard {
  return {
    stepId: step.id,
    number: step.number,
    title: step.title,
    words: step.card ? [step.card] : step.prose,
    hurts: step.hazards.map(({ title }) => title).filter(Boolean),
    controls: step.hazards
      .flatMap(({ controls }) => controls)
      .filter(({ text }) => text !== '')
      .toSorted((a, b) => controlTier[a.level] - controlTier[b.level])
      .map(({ text, level, role }) => ({ text, level, role })),
    stopIf: step.stopIf,
    holdPoints: step.holdPoints.map(({ text }) => text),
    protective: step.needs.protective,
  };
}

/** Controls that a card shows before the rest are asked for: those highest in the hierarchy of control. */
export const controlsShownFirst = 4;

/** Words a person reads on the cards, for judging the reading time; what a card shows only when asked is not counted. */
export function wordsOnCards(cards: CrewCard[]): number {
  const text = cards.flatMap(({ title, words, hurts, controls, stopIf, holdPoints }) => [
    title,
    ...words,
    ...hurts,
    ...controls.slice(0, controlsShownFirst).map((control) => control.text),
    ...stopIf,
    ...holdPoints,
  ]);
  return text.join(' ').match(/\S+/g)?.length ?? 0;
}

/** Words a minute that nobody reads with understanding: above it a sign-on is shown as read too fast. Our own line, from memory of silent reading at 200 to 300. */
export const fastestReading = 600;

/** Whether the cards were passed faster than a person can read them. */
export function readTooFast(words: number, readingMs: number): boolean {
  return words >= 50 && readingMs < (words / fastestReading) * 60_000;
}
