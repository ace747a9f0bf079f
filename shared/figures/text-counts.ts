export type TextCounts = { words: number; sentences: number; syllables: number };

/**
 * Syllables of one English word, by rule: each run of vowels is one (y too, but not at the start); a silent e, es or ed at the end is
 * none; vowels that are spoken apart (ia, io, iu, ua before l or t, yi) add one, but not in -tion, -cial and the like. A digit counts
 * as one. Good to a few per cent over a text, not word by word.
 */
export function syllablesIn(word: string): number {
  const letters = word.toLowerCase().replaceAll(/[^a-z]/g, '');
  const digits = word.replaceAll(/\D/g, '').length;
  if (letters === '') return Math.max(1, digits);
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

/**
 * Words, sentences and syllables of an English text. A word starts with a letter or digit and keeps its hyphens; a sentence ends at
 * . ! ? or : before a space, or at the end of a line, so that list items count.
 */
export function countText(text: string): TextCounts {
  const words = text.match(/[\p{L}\p{N}][\p{L}\p{M}\p{N}'’.-]*/gu) ?? [];
  const sentences = text.split(/[.!?:]+(?=\s|$)|\n+/).filter((part) => /[\p{L}\p{N}]/u.test(part));
  return {
    words: words.length,
    sentences: sentences.length,
    syllables: words.reduce((sum, word) => sum + syllablesIn(word), 0),
  };
}
