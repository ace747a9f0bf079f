import { slip } from './numerics.ts';

/** Numbers for a screen; results themselves are never rounded. A limit to keep under is rounded down, a need is rounded up. */
export const about = (value: number, digits = 1): string => Number(value.toFixed(digits)).toString();

export function noMoreThan(value: number, digits = 1): string {
  return rounded(value, digits, (scaled) => Math.floor(scaled * (1 + slip)));
}

export function atLeast(value: number, digits = 1): string {
  return rounded(value, digits, (scaled) => Math.ceil(scaled * (1 - slip)));
}

function rounded(value: number, digits: number, round: (scaled: number) => number): string {
  const scale = 10 ** digits;
  // A number with no decimals left has nothing to round.
  return String(value >= 2 ** 53 ? value : round(value * scale) / scale);
}

/** A time to keep under, down to the whole minute: “48 minutes”, “6 h 20 min”. */
export function noLongerThan(hours: number): string {
  if (hours >= 24) return 'all day';
  const minutes = Math.floor(hours * 60 * (1 + slip));
  if (minutes < 1) return `${Math.floor(hours * 3600 * (1 + slip))} seconds`;
  if (minutes < 60) return minutes === 1 ? '1 minute' : `${minutes} minutes`;
  return minutes % 60 === 0 ? `${minutes / 60} h` : `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}

/** “a”, “a and b”, “a, b and c”. */
export const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
