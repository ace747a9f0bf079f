import { hash, verify } from '@node-rs/argon2';

/** Argon2id at OWASP's second recommended setting (19 MiB, two passes); argon2id is the library's default algorithm. */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, cost);

/** A hash of nothing anybody knows: an unknown e-mail costs the same time as a wrong password. */
let stranger: Promise<string> | undefined;

/** Whether the password is right; null stands for an account that is not there or has no password yet. */
export async function isRightPassword(passwordHash: string | null, password: string): Promise<boolean> {
  if (passwordHash !== null) return verify(passwordHash, password);
  stranger ??= hashPassword(crypto.randomUUID());
  await verify(await stranger, password);
  return false;
}
