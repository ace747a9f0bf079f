import { and, eq } from 'drizzle-orm';
import { canonicalJson, sha256Hex } from '#shared/kernel/canonical.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { appendToLedger } from '../ledger/ledger.service.ts';
import { talkRecord } from '../ledger/records.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import { attendanceOf, crewOf, getTalk, lockOpenTalk } from './talks.service.ts';
import { talks } from './talks.table.ts';

/** Freezes a talk with its attendance and who was expected, and enters it in the ledger, in one transaction. */
export async function closeTalk(
  db: Db,
  actor: UserActor,
  id: string,
  lockVersion: number,
  now = new Date(),
): Promise<Talk> {
  const talk = await lockOpenTalk(db, actor.orgId, id, lockVersion);
  const expected = await crewOf(db, actor.orgId, talk.siteId);
  const attendance = await attendanceOf(db, actor.orgId, id);
  const {
    topic,
    presenter,
    date,
    time,
    minutes,
    place,
    points,
    mattersRaised,
    outcome,
    representativePresent,
    actions,
    siteId,
  } = talk;
  const canonical = canonicalJson({
    format: 1,
    talkId: id,
    ...{
      siteId,
      topic,
      presenter,
      date,
      time,
      minutes,
      place,
      points,
      mattersRaised,
      outcome,
      representativePresent,
      actions,
    },
    expected,
    attendance: attendance.map((row) => ({
      id: row.id,
      personId: row.personId,
      name: row.personName,
      ledgerSequence: row.ledgerSequence,
    })),
    closedBy: actor.name,
    closedAt: now.toISOString(),
  });
  const closed = {
    ...talk,
    state: 'closed' as const,
    lockVersion: lockVersion + 1,
    closedAt: now,
    closedByName: actor.name,
    expected,
    canonical,
    hash: sha256Hex(canonical),
  };
  const entry = await appendToLedger(db, actor.orgId, {
    kind: 'talk.closed',
    actor: `account:${actor.accountId}`,
    subject: `talk:${id}`,
    payload: talkRecord(closed),
    at: now,
  });
  await db
    .update(talks)
    .set({ ...closed, ledgerSequence: entry.sequence })
    .where(and(eq(talks.orgId, actor.orgId), eq(talks.id, id)));
  return getTalk(db, actor.orgId, id);
}
