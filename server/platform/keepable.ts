import { Refusal } from '#shared/kernel/refusal.ts';

const deepest = 100;

/**
 * Refuses input that no reader could follow or no database could keep, and says where: nested without end, a NUL character, half of
 * a surrogate pair (which a hash would not tell from another).
 */
export function requireKeepable(input: unknown, path = '', depth = 0): void {
  if (typeof input === 'string') return requireKeepableText(input, path);
  if (typeof input !== 'object' || input === null) return;
  if (depth > deepest) throw refuse(path.split('.')[0] ?? '', 'This is nested too deeply to be read.');
  for (const [name, value] of Object.entries(input)) {
    requireKeepableText(name, path);
    requireKeepable(value, path === '' ? name : `${path}.${name}`, depth + 1);
  }
}

function requireKeepableText(text: string, path: string): void {
  if (text.includes('\0') || /\p{Surrogate}/u.test(text))
    throw refuse(path, 'This text holds a character that can’t be kept. Take it out and send again.');
}

const refuse = (path: string, words: string): Refusal =>
  new Refusal('invalid', words, { fields: path === '' ? {} : { [path]: words } });
