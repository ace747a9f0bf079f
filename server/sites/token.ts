import { randomInt } from 'node:crypto';

const letters = 'abcdefghjkmnpqrstuvwxyz23456789';

/** The secret part of a sign-on address: 20 characters that can be read aloud, about 99 bits. */
export const signToken = (): string =>
  Array.from({ length: 20 }, () => letters[randomInt(letters.length)]).join('');
