import type { Reading } from '#shared/signons/signons.api.ts';

export type Card = Reading['cards'][number];

/** A card as it is read aloud, in the order in which it is shown. */
export function spokenCard({ number, title, words, hurts, controls, stopIf, holdPoints, protective }: Card) {
  return [
    `Step ${number}. ${title}.`,
    ...words,
    ...section('What can hurt you', hurts),
    ...section('Stop if', stopIf),
    ...section('Hold point', holdPoints),
    ...section(
      'What we do',
      controls.map(({ text }) => text),
    ),
    ...section('Wear', protective),
  ];
}

/** The opening card as it is read aloud. */
export function spokenOpening(reading: Reading, changeNote: string | null): string[] {
  return [
    `${reading.title}. Revision ${reading.number}.`,
    ...(changeNote ? [`What is different: ${changeNote}`] : []),
    ...(reading.job ? [`The job: ${reading.job}`] : []),
    ...(reading.responsible ? [`Who to ask: ${reading.responsible}`] : []),
    ...(reading.emergency ? [`In an emergency: ${reading.emergency}`] : []),
  ];
}

function section(heading: string, lines: string[]): string[] {
  return lines.length > 0 ? [`${heading}:`, ...lines] : [];
}
