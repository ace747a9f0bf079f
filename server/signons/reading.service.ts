import { and, desc, eq } from 'drizzle-orm';
import { Refusal } from '#shared/kernel/refusal.ts';
import { crewCardsOf } from '#shared/signons/cards.ts';
import { checkQuestionsOf } from '#shared/signons/questions.ts';
import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import { getPerson } from '../people/people.service.ts';
import type { Db } from '../platform/db.ts';
import { getSite } from '../sites/sites.service.ts';
import { revisionById, standingOfRevision } from '../statements/read.service.ts';
import { frozenOf } from '../statements/sheet.service.ts';
import { attendances, talks } from '../talks/talks.table.ts';
import { statementDeclaration, talkDeclarationWords } from './declarations.ts';
import { organisationOf } from './enrol.service.ts';
import { latestSignOns, standingOf, statementsInForce } from './standing.service.ts';

/** What a person has to sign at a site, with what they signed already. */
export async function toSignAt(db: Db, orgId: string, siteId: string, personId: string): Promise<ToSign> {
  const site = await getSite(db, orgId, siteId);
  const person = await getPerson(db, orgId, personId);
  const organisation = await organisationOf(db, orgId);
  const inForce = await statementsInForce(db, orgId, { siteId });
  const signed = await latestSignOns(db, orgId, { siteId });
  return {
    person: { id: person.id, name: person.name, employer: person.employer },
    site: { id: site.id, name: site.name, timeZone: site.timeZone },
    organisation: organisation.name,
    statements: inForce.map((statement) => {
      const standing = standingOf(statement, signed, personId);
      const own = signed.find(
        (signOn) => signOn.statementId === statement.statementId && signOn.personId === personId,
      );
      return {
        revisionId: statement.revisionId,
        statementId: statement.statementId,
        title: statement.title,
        number: statement.current,
        issuedAt: statement.issuedAt.toISOString(),
        standing:
          standing === 'current'
            ? ('signed' as const)
            : standing === 'older'
              ? ('older' as const)
              : ('open' as const),
        signedAt: own?.signedAt.toISOString() ?? null,
        changeNote: statement.changeNote,
      };
    }),
    talks: await openTalks(db, orgId, siteId, personId),
    talkDeclaration: talkDeclarationWords(organisation.profileId),
  };
}

async function openTalks(db: Db, orgId: string, siteId: string, personId: string): Promise<ToSign['talks']> {
  const rows = await db
    .select({ talk: talks, attended: attendances.id })
    .from(talks)
    .leftJoin(
      attendances,
      and(
        eq(attendances.orgId, talks.orgId),
        eq(attendances.talkId, talks.id),
        eq(attendances.personId, personId),
      ),
    )
    .where(and(eq(talks.orgId, orgId), eq(talks.siteId, siteId), eq(talks.state, 'open')))
    .orderBy(desc(talks.date), talks.time);
  return rows.map(({ talk, attended }) => ({
    id: talk.id,
    topic: talk.topic,
    date: talk.date,
    time: talk.time,
    place: talk.place,
    presenter: talk.presenter,
    points: talk.points,
    attended: attended !== null,
  }));
}

/** A revision as crew cards, with its questions and the words to be signed; where a site is given, only of that site. */
export async function readingOf(
  db: Db,
  orgId: string,
  revisionId: string,
  { siteId }: { siteId?: string } = {},
): Promise<Reading> {
  const { revision, statement } = await revisionById(db, orgId, revisionId);
  if (siteId && revision.siteId !== siteId)
    throw new Refusal('missing', 'This statement is not for this site.');
  const frozen = frozenOf(revision);
  const { particulars, steps } = frozen.outline;
  return {
    revisionId,
    statementId: revision.statementId,
    number: revision.number,
    hash: revision.hash,
    title: frozen.title,
    documentTitle: frozen.profile.documentTitle,
    site: frozen.site.name,
    standing: standingOfRevision(revision, statement),
    job: particulars.job,
    emergency: [`Call ${frozen.profile.emergencyNumber}.`, particulars.emergency, frozen.site.emergency]
      .filter(Boolean)
      .join('\n'),
    responsible: particulars.responsible,
    cards: crewCardsOf(frozen),
    questions: checkQuestionsOf(steps, frozen.matrix),
    declaration: statementDeclaration(frozen.profile.id, {
      title: frozen.title,
      revision: String(revision.number),
    }),
    caution: frozen.profile.caution,
  };
}
