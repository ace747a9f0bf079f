import { type TextCounts, countText } from '#shared/figures/text-counts.ts';

export { syllablesIn } from '#shared/figures/text-counts.ts';
export const countsOf = countText;

/** Flesch–Kincaid grade (Kincaid et al. 1975): 0.39·words/sentences + 11.8·syllables/words − 15.59; null where there is nothing to grade. */
export function readingGrade({ words, sentences, syllables }: TextCounts): number | null {
  if (words === 0 || sentences === 0) return null;
  return 0.39 * (words / sentences) + 11.8 * (syllables / words) - 15.59;
}
