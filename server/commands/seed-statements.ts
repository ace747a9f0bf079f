import { newId } from '#shared/kernel/ids.ts';
import type { DrawnSignature } from '#shared/signons/signature.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import type { Db } from '../platform/db.ts';
import { statementDeclaration } from '../signons/declarations.ts';
import { readingOf } from '../signons/reading.service.ts';
import { signOn, type Signing } from '../signons/signons.service.ts';
import { createStatement, saveDraft, submitDraft } from '../statements/draft.service.ts';
import { issueStatement } from '../statements/issue.service.ts';
import { dayOf, daysBefore, known, type Seeded } from './seeded.ts';

const issuedDaysAgo = 3;
const hour = 60 * 60 * 1000;

export async function seedStatements(db: Db, seeded: Seeded): Promise<void> {
  const { statement, draft } = seeded.scenario;
  const id = newId();
  const siteId = known(seeded.sites, statement.site);
  const issuedAt = daysBefore(seeded.now, issuedDaysAgo);
  const started = await createStatement(db, seeded.supervisor, id, {
    siteId,
    title: statement.title,
    starterId: statement.starter,
  });
  const document = filled(started.document, statement.fillIns);
  document.content?.splice(0, 1, {
    type: 'titleBlock',
    attrs: {
      ...document.content[0]?.attrs,
      ...statement.particulars,
      workFrom: dayOf(daysBefore(seeded.now, issuedDaysAgo - 1), seeded.scenario.organisation.timeZone),
      workTo: dayOf(daysBefore(seeded.now, -7), seeded.scenario.organisation.timeZone),
      reviewDate: dayOf(daysBefore(seeded.now, -20), seeded.scenario.organisation.timeZone),
      principalContractorCopy: dayOf(issuedAt, seeded.scenario.organisation.timeZone),
    },
  });
  await saveDraft(db, seeded.supervisor, id, { lockVersion: 1, title: statement.title, document });
  await submitDraft(db, seeded.supervisor, id, 2);
  const issued = await issueStatement(
    db,
    seeded.safetyOfficer,
    id,
    { lockVersion: 3, material: true, changeNote: '' },
    issuedAt,
  );
  const revisionId = issued.revisions[0]?.id ?? '';
  for (const entry of statement.signOns) {
    await seedSignOn(db, seeded, {
      siteId,
      revisionId,
      entry,
      at: new Date(issuedAt.getTime() + entry.hoursAfter * hour),
    });
  }
  await createStatement(db, seeded.supervisor, newId(), {
    siteId: known(seeded.sites, draft.site),
    title: draft.title,
    starterId: draft.starter,
  });
}

/** The document with every fill-in that the scenario knows filled. */
function filled(node: NodeJson, values: Record<string, string>): NodeJson {
  if (node.type === 'fillIn')
    return { ...node, attrs: { ...node.attrs, value: values[node.attrs?.label as string] ?? '' } };
  return node.content ? { ...node, content: node.content.map((child) => filled(child, values)) } : node;
}

type Entry = Seeded['scenario']['statement']['signOns'][number];

async function seedSignOn(
  db: Db,
  seeded: Seeded,
  { siteId, revisionId, entry, at }: { siteId: string; revisionId: string; entry: Entry; at: Date },
): Promise<void> {
  const reading = await readingOf(db, seeded.orgId, revisionId);
  const { id, version, language } = statementDeclaration(seeded.scenario.organisation.profileId, {
    title: reading.title,
    revision: String(reading.number),
  });
  await signOn(
    db,
    signingOf(seeded, siteId, entry.person, entry.how === 'phone'),
    newId(),
    {
      revisionId,
      revisionHash: reading.hash,
      signature:
        entry.how === 'typed'
          ? { method: 'typed', typedName: nameOf(seeded, entry.person), witness: seeded.supervisor.name }
          : { method: 'drawn', drawn: inventedSignature(nameOf(seeded, entry.person)) },
      declaration: { id, version, language },
      signedAt: at.toISOString(),
      readingMs: entry.readingSeconds * 1000,
      answers: reading.questions
        .slice(0, 3)
        .map((question) => ({ question: question.id, tries: [question.right] })),
      language: 'en',
    },
    at,
  );
}

/** Who signs and on whose device: a demo phone that is not enrolled any more, or the supervisor's. */
export function signingOf(
  { orgId, people, supervisor }: Seeded,
  siteId: string,
  person: string,
  ownPhone: boolean,
): Signing {
  const { accountId, name } = supervisor;
  return {
    orgId,
    siteId,
    personId: known(people, person),
    by: ownPhone
      ? { deviceId: newId() }
      : { accountId, name, own: supervisor.personId === known(people, person) },
    userAgent: 'Demo seed',
  };
}

export const nameOf = ({ scenario }: Seeded, key: string): string =>
  scenario.people.find((person) => person.key === key)?.name ?? key;

/** A scribble that differs from name to name and is the same every time. */
export function inventedSignature(name: string): DrawnSignature {
  const strokes: DrawnSignature['strokes'] = name.split(' ').map((word, at) =>
    [...word].flatMap((letter, index): DrawnSignature['strokes'][number] => {
      const code = letter.codePointAt(0) ?? 0;
      const x = 20 + at * 130 + index * 14;
      return [
        [x, 70 - (code % 23), index * 90],
        [x + 7, 88 + (code % 11), index * 90 + 45],
      ];
    }),
  );
  return { width: 420, height: 140, strokes };
}
