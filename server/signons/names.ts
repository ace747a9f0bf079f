/** Lower case without accents, so that "nguyen" finds "Nguyễn". */
const plain = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/\p{Diacritic}/gu, '')
    .replaceAll('đ', 'd')
    .replaceAll('Đ', 'D')
    .toLowerCase()
    .trim()
    .replace(/\s+/g, ' ');

/** Whether every word that is written begins a word of the name, in any order. */
export function nameBegins(name: string, written: string): boolean {
  const parts = plain(name).split(' ');
  const words = plain(written).split(' ').filter(Boolean);
  return words.length > 0 && words.every((word) => parts.some((part) => part.startsWith(word)));
}

/** Whether the name holds what is written, anywhere. */
export const nameHolds = (name: string, written: string): boolean => plain(name).includes(plain(written));
