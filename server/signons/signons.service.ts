import { and, eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { formatDay } from '#shared/kernel/work-date.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Person } from '#shared/people/people.api.ts';
import { inkOf, leastInk, type Signature, signatureSvg } from '#shared/signons/signature.ts';
import type { attendanceBody, Declaration, SignOnBody } from '#shared/signons/signons.api.ts';
import { appendToLedger } from '../ledger/ledger.service.ts';
import { attendanceRecord, signOnRecord } from '../ledger/records.ts';
import { getPerson } from '../people/people.service.ts';
import type { Db } from '../platform/db.ts';
import { putOnCrew } from '../sites/sites.service.ts';
import { revisionById, standingOfRevision } from '../statements/read.service.ts';
import { revisions, statements } from '../statements/statements.table.ts';
import { attendances, talks } from '../talks/talks.table.ts';
import { requireDeclaration, statementDeclaration, talkDeclaration } from './declarations.ts';
import { organisationOf } from './enrol.service.ts';
import { signOns } from './signons.table.ts';

/** Who signs, where, and on whose device. */
export type Signing = {
  orgId: string;
  siteId: string;
  personId: string;
  /** A worker's own phone, or the account on whose device it is signed. */
  by: { deviceId: string } | { accountId: string; name: string; own: boolean };
  userAgent: string;
};

/** Keeps a signature under a revision, exactly once: a resend of the same id answers as the first did. */
export async function signOn(db: Db, signing: Signing, id: string, body: SignOnBody, now = new Date()) {
  await holdStatement(db, signing.orgId, body.revisionId);
  const { revision, statement } = await revisionById(db, signing.orgId, body.revisionId);
  const superseded = standingOfRevision(revision, statement) !== 'current';
  const known = await signOnReceived(db, signing, id, body.revisionId);
  if (known) return { id, receivedAt: known.receivedAt.toISOString(), superseded };
  if (revision.siteId !== signing.siteId)
    throw new Refusal('missing', 'This statement is not for this site.');
  if (revision.hash !== body.revisionHash)
    throw new Refusal(
      'conflict',
      'What was shown is not this revision. Open the statement again and read it.',
    );
  const organisation = await organisationOf(db, signing.orgId);
  const declaration = requireDeclaration(
    body.declaration,
    statementDeclaration(organisation.profileId, {
      title: revision.title,
      revision: String(revision.number),
    }),
  );
  const person = await getPerson(db, signing.orgId, signing.personId);
  const row = {
    ...signatureRow(signing, person, { ...body, declaration }, now),
    id,
    siteId: signing.siteId,
    statementId: revision.statementId,
    revisionId: revision.id,
    revisionNumber: revision.number,
    revisionHash: revision.hash,
    readingMs: body.readingMs,
    answers: body.answers,
  };
  await joinCrew(db, signing, person);
  const entry = await appendToLedger(db, signing.orgId, {
    kind: 'signOn',
    actor: `person:${signing.personId}`,
    subject: `signOn:${id}`,
    payload: signOnRecord(row),
    at: now,
  });
  await db.insert(signOns).values({ ...row, ledgerSequence: entry.sequence });
  return { id, receivedAt: now.toISOString(), superseded };
}

/** The sign-on that this id already stands for. The same id for another person or revision is refused. */
async function signOnReceived(db: Db, { orgId, personId }: Signing, id: string, revisionId: string) {
  await lockId(db, id);
  const [known] = await db
    .select()
    .from(signOns)
    .where(and(eq(signOns.orgId, orgId), eq(signOns.id, id)));
  if (known && (known.personId !== personId || known.revisionId !== revisionId))
    throw new Refusal('conflict', 'This sign-on was received already, for somebody or something else.');
  return known;
}

/**
 * Nobody issues or withdraws the statement until this sign-on is kept, so that the receipt tells the truth. Taken before the ledger's
 * head, in the order of whoever issues: the other way round each would wait for the other.
 */
async function holdStatement(db: Db, orgId: string, revisionId: string): Promise<void> {
  await db
    .select({ id: statements.id })
    .from(statements)
    .innerJoin(
      revisions,
      and(eq(revisions.orgId, statements.orgId), eq(revisions.statementId, statements.id)),
    )
    .where(and(eq(statements.orgId, orgId), eq(revisions.id, revisionId)))
    .for('share', { of: statements });
}

/** Two copies of one resend at the same moment wait for each other here. */
async function lockId(db: Db, id: string): Promise<void> {
  await db.execute(sql`select pg_advisory_xact_lock(hashtextextended(${id}, 0))`);
}

type Shown = { signature: Signature; signedAt: string; language: string; declaration: Declaration };

/** The part of the row that any signature has. */
function signatureRow(
  { orgId, personId, by, userAgent }: Signing,
  person: Person,
  { signature, signedAt, language, declaration }: Shown,
  now: Date,
) {
  if (signature.method === 'drawn' && inkOf(signature.drawn) < leastInk)
    throw new Refusal('invalid', 'There is too little in the box to be a signature. Sign again.', {
      fields: { 'signature.drawn': 'Sign with your name or your usual mark.' },
    });
  const onDevice = 'deviceId' in by;
  const handedRound = !onDevice && !by.own;
  return {
    orgId,
    personId,
    method: signature.method,
    drawn: signature.method === 'drawn' ? signature.drawn : null,
    svg: signature.method === 'drawn' ? signatureSvg(signature.drawn) : null,
    typedName: signature.method === 'typed' ? signature.typedName : null,
    witness: signature.method === 'typed' ? signature.witness : null,
    declaration,
    signedAt: new Date(signedAt),
    receivedAt: now,
    language,
    deviceId: onDevice ? by.deviceId : null,
    userAgent: userAgent.slice(0, 300),
    handedRoundBy: handedRound ? by.accountId : null,
    handedRoundByName: handedRound ? by.name : null,
    personName: person.name,
    employerName: person.employer,
    trade: person.trade,
    inductionCard: person.inductionCard,
  };
}

/** Whoever signs is on the crew; a late signature of somebody taken off the lists is kept, and does not bring them back. */
async function joinCrew(db: Db, { orgId, siteId, personId }: Signing, { archivedAt }: Person): Promise<void> {
  if (!archivedAt) await putOnCrew(db, orgId, siteId, personId);
}

/** Keeps a signature under a talk, once a person. */
export async function attend(
  db: Db,
  signing: Signing,
  id: string,
  body: z.output<typeof attendanceBody>,
  now = new Date(),
) {
  await lockId(db, `${body.talkId}:${signing.personId}`);
  const [talk] = await db
    .select()
    .from(talks)
    .where(and(eq(talks.orgId, signing.orgId), eq(talks.id, body.talkId)))
    .for('share');
  if (!talk || talk.siteId !== signing.siteId) throw new Refusal('missing', 'This talk is not at this site.');
  const [known] = await db
    .select()
    .from(attendances)
    .where(
      and(
        eq(attendances.orgId, signing.orgId),
        eq(attendances.talkId, talk.id),
        eq(attendances.personId, signing.personId),
      ),
    );
  if (known) return { id: known.id, receivedAt: known.receivedAt.toISOString() };
  if (talk.state === 'closed')
    throw new Refusal('conflict', 'This talk is closed. Tell the supervisor that you were there.');
  const organisation = await organisationOf(db, signing.orgId);
  const declaration = requireDeclaration(
    body.declaration,
    talkDeclaration(organisation.profileId, { topic: talk.topic, date: formatDay(talk.date) }),
  );
  const person = await getPerson(db, signing.orgId, signing.personId);
  const row = { ...signatureRow(signing, person, { ...body, declaration }, now), id, talkId: talk.id };
  await joinCrew(db, signing, person);
  const entry = await appendToLedger(db, signing.orgId, {
    kind: 'talk.attended',
    actor: `person:${signing.personId}`,
    subject: `attendance:${id}`,
    payload: attendanceRecord(row),
    at: now,
  });
  const [kept] = await db
    .insert(attendances)
    .values({ ...row, ledgerSequence: entry.sequence })
    .onConflictDoNothing()
    .returning({ id: attendances.id });
  if (!kept)
    throw new Refusal('conflict', 'This attendance was received already, for somebody or something else.');
  return { id, receivedAt: now.toISOString() };
}
