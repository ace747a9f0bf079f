import { randomBytes } from 'node:crypto';
import { and, eq, gt, isNull, ne, sql } from 'drizzle-orm';
import { Refusal } from '#shared/kernel/refusal.ts';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import type { Db } from '../platform/db.ts';
import { httpSessions } from '../platform/platform.table.ts';
import { queueMail } from '../mail/outgoing.service.ts';
import { accounts, memberships, passwordTokens } from './account.table.ts';
import { hashPassword, isRightPassword } from './password.ts';

const hour = 60 * 60 * 1000;

/** The account of an e-mail and password. One answer for an unknown address and a wrong password. */
export async function accountOf(db: Db, { email, password }: { email: string; password: string }) {
  const [account] = await db
    .select()
    .from(accounts)
    .where(eq(sql`lower(${accounts.email})`, email));
  const right = await isRightPassword(account?.passwordHash ?? null, password);
  if (!account || !right)
    throw new Refusal('invalid', 'E-mail or password is not right.', {
      fields: { password: 'E-mail or password is not right.' },
    });
  return account;
}

/** Ends every session of an account, or every one but `except`. */
export async function endSessions(db: Db, accountId: string, except?: string): Promise<void> {
  await db
    .delete(httpSessions)
    .where(
      and(
        sql`${httpSessions.sess}->>'accountId' = ${accountId}`,
        except ? ne(httpSessions.sid, except) : undefined,
      ),
    );
}

/** A new single-use link to set a password. The link goes out by mail; only its hash stays here. */
export async function passwordLink(
  db: Db,
  accountId: string,
  publicUrl: string,
  lifetimeHours: number,
): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  await db.insert(passwordTokens).values({
    tokenHash: sha256Hex(token),
    accountId,
    expiresAt: new Date(Date.now() + lifetimeHours * hour),
  });
  return `${publicUrl}/reset/${token}`;
}

/** Mails a link where the address is known, and does nothing where it is not; the caller answers the same. */
export async function askReset(db: Db, email: string, publicUrl: string): Promise<void> {
  const [account] = await db
    .select()
    .from(accounts)
    .where(eq(sql`lower(${accounts.email})`, email));
  if (!account) return;
  const link = await passwordLink(db, account.id, publicUrl, 1);
  await queueMail(db, {
    to: account.email,
    subject: 'A new password for Toeboard',
    text: `Somebody asked for a new password for this address. To set one, open this link within an hour:\n\n${link}\n\nIf it was not you, do nothing: your password stays as it is.`,
  });
}

/** Sets a password by a mailed link, once; every session of the account ends. `passwordHash` is made before the transaction. */
export async function useResetLink(db: Db, token: string, passwordHash: string): Promise<void> {
  const [used] = await db
    .update(passwordTokens)
    .set({ usedAt: new Date() })
    .where(
      and(
        eq(passwordTokens.tokenHash, sha256Hex(token)),
        isNull(passwordTokens.usedAt),
        gt(passwordTokens.expiresAt, new Date()),
      ),
    )
    .returning({ accountId: passwordTokens.accountId });
  if (!used)
    throw new Refusal('invalid', 'This link was used already or has run out. Ask for a new one.', {
      fields: { token: 'This link no longer works.' },
    });
  await db.update(accounts).set({ passwordHash }).where(eq(accounts.id, used.accountId));
  await db
    .update(memberships)
    .set({ joinedAt: new Date() })
    .where(and(eq(memberships.accountId, used.accountId), isNull(memberships.joinedAt)));
  await endSessions(db, used.accountId);
}

/** Changes the password of somebody signed in; their other sessions end. */
export async function changeOwnPassword(
  db: Db,
  {
    accountId,
    sessionId,
    current,
    password,
  }: { accountId: string; sessionId: string; current: string; password: string },
): Promise<void> {
  const [account] = await db.select().from(accounts).where(eq(accounts.id, accountId));
  if (!(await isRightPassword(account?.passwordHash ?? null, current)))
    throw new Refusal('invalid', 'The current password is not right.', {
      fields: { current: 'This is not the current password.' },
    });
  const passwordHash = await hashPassword(password);
  await db.transaction(async (tx) => {
    await tx.update(accounts).set({ passwordHash }).where(eq(accounts.id, accountId));
    await endSessions(tx, accountId, sessionId);
  });
}
