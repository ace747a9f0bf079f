import { readTooFast } from '../signons/cards.ts';
import { countsAsCurrent, type RevisionMark } from '../statements/standing.ts';
import type { Exception } from './audit.api.ts';

type Who = { personId: string; person: string; employer: string };
type Where = { siteId: string; site: string; timeZone: string };

/** What the exceptions are judged from. */
export type AuditFacts = {
  /** Statements in force, each with the crew of its site. */
  statements: (Where & {
    statementId: string;
    title: string;
    current: number;
    wordsOnCards: number;
    revisions: RevisionMark[];
    crew: Who[];
    /** Each person's sign-on under the highest revision that they signed. */
    signOns: { id: string; personId: string; revision: number; signedAt: string; readingMs: number }[];
  })[];
  /** Closed talks, with who was expected and who was there. */
  talks: (Where & {
    talkId: string;
    topic: string;
    date: string;
    closedAt: string;
    expected: Who[];
    attended: string[];
  })[];
};

/** Days that a missed talk is shown after it was closed. */
const missedTalkDays = 30;

/** The earliest closing of a talk whose missing people are still shown. */
export const earliestMissedTalk = (now: Date): Date => new Date(now.getTime() - missedTalkDays * 86_400_000);

/** Everything that a safety officer should look at first, each with its evidence. Pure: facts in, list out. */
export function exceptionsOf({ statements, talks }: AuditFacts, now: Date): Exception[] {
  const since = earliestMissedTalk(now).toISOString();
  return [
    ...statements.flatMap(ofStatement),
    ...talks.filter(({ closedAt }) => closedAt >= since).flatMap(ofTalk),
  ];
}

function ofStatement(statement: AuditFacts['statements'][number]): Exception[] {
  const { siteId, site, timeZone, statementId, title, current } = statement;
  const register = `/register?statementId=${statementId}`;
  return statement.crew.flatMap((who): Exception[] => {
    const base = { siteId, site, timeZone, ...who };
    const signOn = statement.signOns.find(({ personId }) => personId === who.personId);
    if (!signOn)
      return [
        {
          ...base,
          kind: 'notSigned',
          words: `Has not signed “${title}”, revision ${current}.`,
          at: null,
          evidence: `${register}&status=none`,
        },
      ];
    if (!countsAsCurrent(signOn.revision, statement.revisions, current)) {
      const words = `Signed revision ${signOn.revision} of “${title}”; revision ${current} is in force.`;
      return [
        { ...base, kind: 'signedOlder', words, at: signOn.signedAt, evidence: `/sign-ons/${signOn.id}` },
      ];
    }
    if (readTooFast(statement.wordsOnCards, signOn.readingMs)) {
      const seconds = Math.max(1, Math.round(signOn.readingMs / 1000));
      const words = `Passed ${statement.wordsOnCards} words of “${title}” in ${seconds} ${seconds === 1 ? 'second' : 'seconds'}.`;
      return [
        { ...base, kind: 'readTooFast', words, at: signOn.signedAt, evidence: `/sign-ons/${signOn.id}` },
      ];
    }
    return [];
  });
}

function ofTalk({
  talkId,
  topic,
  date,
  closedAt,
  expected,
  attended,
  siteId,
  site,
  timeZone,
}: AuditFacts['talks'][number]): Exception[] {
  return expected
    .filter(({ personId }) => !attended.includes(personId))
    .map((who) => ({
      kind: 'talkMissed',
      siteId,
      site,
      timeZone,
      ...who,
      words: `Was not at “${topic}” on ${date}.`,
      at: closedAt,
      evidence: `/talks/${talkId}`,
    }));
}
