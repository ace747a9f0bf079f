import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import {
  type registerQuery,
  type RegisterRow,
  registerStatusNames,
  type SignOnRecord,
} from '#shared/signons/register.api.ts';
import { ledgerEntries } from '../ledger/ledger.table.ts';
import { employers, people } from '../people/people.table.ts';
import { csvOf } from '../platform/csv.ts';
import type { Db } from '../platform/db.ts';
import { crewMembers, sites } from '../sites/sites.table.ts';
import { revisionById, standingOfRevision } from '../statements/read.service.ts';
import { frozenOf } from '../statements/sheet.service.ts';
import { nameHolds } from './names.ts';
import { signOns } from './signons.table.ts';
import {
  type InForce,
  latestSignOns,
  type LatestSignOn,
  standingOf,
  statementsInForce,
} from './standing.service.ts';

type Query = z.output<typeof registerQuery>;
type Member = {
  personId: string;
  name: string;
  trade: string;
  employer: string;
  /** Sites whose crew the person is on; none for somebody taken off the lists. */
  onCrewOf: Set<string>;
};

/** Per statement in force: everybody of the site's crew, and whoever signed without being on it. */
export async function registerRows(db: Db, orgId: string, query: Query) {
  const inForce = await statementsInForce(db, orgId, query);
  const signed = await latestSignOns(db, orgId, query);
  const members = await everybody(db, orgId, query.employerId);
  const scope = inForce
    .flatMap((statement) => rowsOf(statement, signed, members))
    .filter(({ name }) => !query.search || nameHolds(name, query.search));
  const counts = { current: 0, older: 0, none: 0 };
  for (const { status } of scope) counts[status] += 1;
  const rows = scope
    .filter(({ status }) => !query.status || status === query.status)
    .toSorted(byColumn(query));
  return { rows, counts };
}

async function everybody(db: Db, orgId: string, employerId: string | undefined): Promise<Member[]> {
  const rows = await db
    .select({
      personId: people.id,
      name: people.name,
      trade: people.trade,
      employer: employers.name,
      archivedAt: people.archivedAt,
    })
    .from(people)
    .innerJoin(employers, and(eq(employers.orgId, people.orgId), eq(employers.id, people.employerId)))
    .where(and(eq(people.orgId, orgId), employerId ? eq(people.employerId, employerId) : undefined));
  const crews = await db
    .select({ siteId: crewMembers.siteId, personId: crewMembers.personId })
    .from(crewMembers)
    .where(eq(crewMembers.orgId, orgId));
  const members = new Map(rows.map((row) => [row.personId, { ...row, onCrewOf: new Set<string>() }]));
  for (const { siteId, personId } of crews) {
    const member = members.get(personId);
    if (member && !member.archivedAt) member.onCrewOf.add(siteId);
  }
  return [...members.values()];
}

function rowsOf(statement: InForce, signed: LatestSignOn[], members: Member[]): RegisterRow[] {
  const own = new Map(
    signed
      .filter(({ statementId }) => statementId === statement.statementId)
      .map((signOn) => [signOn.personId, signOn]),
  );
  return members
    .filter(({ personId, onCrewOf }) => onCrewOf.has(statement.siteId) || own.has(personId))
    .map((member) => rowOf(statement, member, own.get(member.personId)));
}

function rowOf(statement: InForce, member: Member, signOn: LatestSignOn | undefined): RegisterRow {
  return {
    statementId: statement.statementId,
    statement: statement.title,
    siteId: statement.siteId,
    site: statement.site,
    timeZone: statement.timeZone,
    currentRevision: statement.current,
    personId: member.personId,
    // As they stood when they signed, where they did.
    name: signOn?.personName ?? member.name,
    employer: signOn?.employerName ?? member.employer,
    trade: signOn?.trade ?? member.trade,
    onCrew: member.onCrewOf.has(statement.siteId),
    status: standingOf(statement, signOn ? [signOn] : [], member.personId),
    signOn: signOn
      ? {
          id: signOn.id,
          revision: signOn.revisionNumber,
          signedAt: signOn.signedAt.toISOString(),
          receivedAt: signOn.receivedAt.toISOString(),
          method: signOn.method,
          handedRoundBy: signOn.handedRoundByName,
          readingMs: signOn.readingMs,
        }
      : null,
  };
}

const statusOrder = { none: 0, older: 1, current: 2 };

function byColumn({ sort, direction }: Query) {
  const keyOf = (row: RegisterRow): string => {
    if (sort === 'signedAt') return row.signOn?.signedAt ?? '';
    if (sort === 'status') return String(statusOrder[row.status]);
    return row[sort];
  };
  const sign = direction === 'up' ? 1 : -1;
  return (a: RegisterRow, b: RegisterRow) =>
    sign * keyOf(a).localeCompare(keyOf(b), 'en') || a.name.localeCompare(b.name, 'en');
}

export async function registerCsv(db: Db, orgId: string, query: Query): Promise<string> {
  const { rows } = await registerRows(db, orgId, query);
  const header = [
    'Site',
    'Statement',
    'Revision in force',
    'Name',
    'Employer',
    'Trade',
    'Standing',
    'Revision signed',
    'Signed',
    'Time zone',
    'Signed (ISO 8601)',
    'Received (ISO 8601)',
    'Method',
    'Handed round by',
    'Reading seconds',
  ];
  return csvOf(
    header,
    rows.map(({ signOn, ...row }) => [
      row.site,
      row.statement,
      row.currentRevision,
      row.name,
      row.employer,
      row.trade,
      registerStatusNames[row.status],
      signOn?.revision ?? '',
      signOn ? formatInstant(signOn.signedAt, row.timeZone) : '',
      row.timeZone,
      signOn?.signedAt ?? '',
      signOn?.receivedAt ?? '',
      signOn?.method ?? '',
      signOn?.handedRoundBy ?? '',
      signOn ? Math.round(signOn.readingMs / 1000) : '',
    ]),
  );
}

/** One sign-on with all that was kept of it. */
export async function signOnRecordOf(db: Db, orgId: string, id: string): Promise<SignOnRecord> {
  const [row] = await db
    .select({ signOn: signOns, site: sites.name, timeZone: sites.timeZone, ledgerHash: ledgerEntries.hash })
    .from(signOns)
    .innerJoin(sites, and(eq(sites.orgId, signOns.orgId), eq(sites.id, signOns.siteId)))
    .innerJoin(
      ledgerEntries,
      and(eq(ledgerEntries.orgId, signOns.orgId), eq(ledgerEntries.sequence, signOns.ledgerSequence)),
    )
    .where(and(eq(signOns.orgId, orgId), eq(signOns.id, id)));
  if (!row) throw new Refusal('missing', 'This sign-on is not there.');
  const { signOn } = row;
  const { revision, statement } = await revisionById(db, orgId, signOn.revisionId);
  return {
    id,
    statementId: signOn.statementId,
    statement: revision.title,
    revision: signOn.revisionNumber,
    revisionHash: signOn.revisionHash,
    standing: standingOfRevision(revision, statement),
    site: row.site,
    timeZone: row.timeZone,
    person: {
      id: signOn.personId,
      name: signOn.personName,
      employer: signOn.employerName,
      trade: signOn.trade,
      inductionCard: signOn.inductionCard,
    },
    method: signOn.method,
    svg: signOn.svg,
    typedName: signOn.typedName,
    witness: signOn.witness,
    declaration: signOn.declaration,
    signedAt: signOn.signedAt.toISOString(),
    receivedAt: signOn.receivedAt.toISOString(),
    readingMs: signOn.readingMs,
    wordsOnCards: revision.wordsOnCards,
    answers: answersInWords(signOn.answers, revision),
    language: signOn.language as SignOnRecord['language'],
    device: signOn.userAgent,
    handedRoundBy: signOn.handedRoundByName,
    ledger: { sequence: signOn.ledgerSequence, hash: row.ledgerHash },
  };
}

/** The answers with the questions' words, from the revision that was shown. */
function answersInWords(
  answers: { question: string; tries: number[] }[],
  revision: { canonical: string },
): SignOnRecord['answers'] {
  const { steps } = frozenOf(revision).outline;
  return answers.flatMap(({ question: id, tries }) => {
    const [stepId, index] = id.split('.');
    const question = steps.find((step) => step.id === stepId)?.questions[Number(index)];
    if (!question) return [];
    return [
      {
        question: question.ask,
        tries: tries.map((at) => question.answers[at] ?? '?'),
        right: tries.at(-1) === question.right,
      },
    ];
  });
}
