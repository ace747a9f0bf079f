/**
 * A simple syllable counter for English, good enough to hold short plain texts under a grade; published counts differ by a few per
 * cent for long words. Each run of vowels is one syllable (y counts, except as the first letter); a silent e, es or ed at the end
 * counts nothing; vowels that are spoken apart (ia, io, iu, ual, ying, and area and idea) count one more, except in -tion, -cial
 * and the like; every word has at least one. A number counts one for each digit.
 */
export function syllablesIn(word: string): number {
  const letters = word.toLowerCase().replaceAll(/[^a-z]/g, '');
  const digits = word.replaceAll(/\D/g, '').length;
  if (letters === '') return digits;
  const spoken = letters
    .replace(/^y/, '')
    .replace(/(?<![aeiouy]|[^aeiouy]l)e$/, '')
    .replace(/(?<![aeiouytd])ed$/, 'd')
    .replace(/(?<![aeiouyscxzg]|[cs]h|[^aeiouy]l)es$/, 's')
    .replaceAll(/([tscg])i(?=on|an|al|ous|en)/g, '$1');
  const runs = spoken.match(/[aeiouy]+/g)?.length ?? 0;
  const apart = spoken.match(/i[aou]|(?<!q)ua[lt]|yi|[rd]eas?$/g)?.length ?? 0;
  return Math.max(1, runs + apart) + digits;
}

export type Counts = { words: number; sentences: number; syllables: number };

export function countsOf(text: string): Counts {
  const words = text.match(/[\p{L}\p{N}][\p{L}\p{N}'’.-]*/gu) ?? [];
  const sentences = text.split(/[.!?:](?:\s|$)/).filter((part) => /[\p{L}\p{N}]/u.test(part)).length;
  return {
    words: words.length,
    sentences,
    syllables: words.reduce((sum, word) => sum + syllablesIn(word), 0),
  };
}

/** Flesch–Kincaid grade (Kincaid et al. 1975): 0.39·words/sentences + 11.8·syllables/words − 15.59; null where there is nothing to grade. */
export function readingGrade({ words, sentences, syllables }: Counts): number | null {
  if (words === 0 || sentences === 0) return null;
  return 0.39 * (words / sentences) + 11.8 * (syllables / words) - 15.59;
}
