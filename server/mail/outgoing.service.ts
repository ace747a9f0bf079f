import { and, asc, eq, lt, or } from 'drizzle-orm';
import { createTransport } from 'nodemailer';
import type { Logger } from 'pino';
import { newId } from '#shared/kernel/ids.ts';
import type { Config } from '../platform/config.ts';
import type { Database, Db } from '../platform/db.ts';
import { outgoingMails } from '../platform/platform.table.ts';

export type Mail = { to: string; subject: string; text: string };

/** Queues a mail in the transaction that calls for it: no mail without the deed, no deed without the mail. */
export async function queueMail(db: Db, { to, subject, text }: Mail): Promise<void> {
  await db.insert(outgoingMails).values({ id: newId(), recipient: to, subject, body: text });
}

const mostAttempts = 8;
const sweepSeconds = 30;
const staleMinutes = 5;

export type Postman = { deliver: () => void; stop: () => Promise<void> };

/**
 * Sends queued mail after a commit, and sweeps for what is left over from a crash or a mail host that was away. Several servers may
 * do so at once: a mail in hand is locked. Without a mail host the mail is kept for the development outbox.
 */
export function startPostman({ db }: Database, config: Config, log: Logger): Postman {
  const transport = config.smtpUrl ? createTransport(config.smtpUrl) : null;
  let running: Promise<void> = Promise.resolve();
  let stopped = false;

  /** Takes one mail in hand; the sending itself happens outside the transaction, which must not wait for a mail host. */
  function claim() {
    return db.transaction(async (tx) => {
      const stale = new Date(Date.now() - staleMinutes * 60_000);
      const [mail] = await tx
        .select()
        .from(outgoingMails)
        .where(
          or(
            eq(outgoingMails.status, 'queued'),
            and(eq(outgoingMails.status, 'sending'), lt(outgoingMails.sentAt, stale)),
          ),
        )
        .orderBy(asc(outgoingMails.attempts), asc(outgoingMails.createdAt))
        .limit(1)
        .for('update', { skipLocked: true });
      if (!mail) return null;
      const attempts = mail.attempts + 1;
      await tx
        .update(outgoingMails)
        .set({ status: 'sending', sentAt: new Date(), attempts })
        .where(eq(outgoingMails.id, mail.id));
      return { ...mail, attempts };
    });
  }

  /** Sends one mail; false when there is none left to try now. */
  async function deliverOne(): Promise<boolean> {
    const mail = await claim();
    if (!mail) return false;
    const mark = (status: string) =>
      db.update(outgoingMails).set({ status, sentAt: new Date() }).where(eq(outgoingMails.id, mail.id));
    if (!transport) {
      await mark('kept');
      return true;
    }
    try {
      await transport.sendMail({
        from: config.mailFrom,
        to: mail.recipient,
        subject: mail.subject,
        text: mail.body,
      });
      await mark('sent');
      return true;
    } catch (error) {
      log.warn({ err: error, mail: mail.id }, 'A mail could not be sent');
      await mark(mail.attempts >= mostAttempts ? 'failed' : 'queued');
      return false;
    }
  }

  async function deliverAll(): Promise<void> {
    while (!stopped && (await deliverOne()));
  }

  function deliver(): void {
    running = running
      .then(deliverAll)
      .catch((error: unknown) => log.error({ err: error }, 'Mail delivery failed'));
  }

  const timer = setInterval(deliver, sweepSeconds * 1000);
  timer.unref();
  return {
    deliver,
    async stop() {
      stopped = true;
      clearInterval(timer);
      await running;
    },
  };
}
