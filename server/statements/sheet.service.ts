import { and, asc, desc, eq, inArray } from 'drizzle-orm';
import QRCode from 'qrcode';
import { shortHash } from '#shared/kernel/canonical.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { type Frozen, frozenSchema } from '#shared/statements/frozen.ts';
import { countsAsCurrent } from '#shared/statements/standing.ts';
import type { Sheet, SignatureOnSheet } from '#shared/statements/statements.api.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import type { Platform } from '../platform/platform.ts';
import { signOns } from '../signons/signons.table.ts';
import { freeze } from './issue.service.ts';
import { presentRevision, revisionByNumber, type RevisionRecord } from './read.service.ts';
import { revisions, statements } from './statements.table.ts';

/** What was frozen, read back from its canonical form. */
export const frozenOf = ({ canonical }: Pick<RevisionRecord, 'canonical'>): Frozen =>
  frozenSchema.parse(JSON.parse(canonical));

type Printing = Pick<Platform, 'publicUrl' | 'print'>;

export async function sheetOfRevision(
  db: Db,
  actor: UserActor,
  { id, number }: { id: string; number: number },
  { publicUrl, print }: Printing,
): Promise<Sheet> {
  const { revision, statement } = await revisionByNumber(db, actor.orgId, id, number);
  const verifyAddress = `${publicUrl()}/verify/${shortHash(revision.hash)}`;
  return {
    frozen: frozenOf(revision),
    revision: presentRevision(revision, statement),
    signatures: await signaturesFor(db, actor.orgId, revision),
    verifyAddress,
    verifyQrSvg: await QRCode.toString(verifyAddress, { type: 'svg', margin: 0, errorCorrectionLevel: 'M' }),
    printedAt: new Date().toISOString(),
    pdf: print.available,
  };
}

export async function sheetOfDraft(
  db: Db,
  actor: UserActor,
  id: string,
  { print }: Printing,
): Promise<Sheet> {
  const [statement] = await db
    .select()
    .from(statements)
    .where(and(eq(statements.orgId, actor.orgId), eq(statements.id, id)));
  if (!statement) throw new Refusal('missing', 'This statement is not there.');
  const frozen = await freeze(db, actor, statement, {
    revision: (statement.currentRevision ?? 0) + 1,
    material: true,
    changeNote: '',
    issuedAt: new Date(),
  });
  return {
    frozen: { ...frozen, issuedBy: '' },
    revision: null,
    signatures: [],
    verifyAddress: null,
    verifyQrSvg: null,
    printedAt: new Date().toISOString(),
    pdf: print.available,
  };
}

/**
 * The signatures that count for a revision: those under it, and those under an earlier one that only changes that are not material
 * have followed. One a person, under the latest revision that they signed; of several under that one, the first.
 */
async function signaturesFor(
  db: Db,
  orgId: string,
  { statementId, number }: RevisionRecord,
): Promise<SignatureOnSheet[]> {
  const marks = await db
    .select({ number: revisions.number, material: revisions.material })
    .from(revisions)
    .where(and(eq(revisions.orgId, orgId), eq(revisions.statementId, statementId)));
  const counting = marks.filter((mark) => countsAsCurrent(mark.number, marks, number));
  const rows = await db
    .selectDistinctOn([signOns.personId])
    .from(signOns)
    .where(
      and(
        eq(signOns.orgId, orgId),
        eq(signOns.statementId, statementId),
        inArray(
          signOns.revisionNumber,
          counting.map((mark) => mark.number),
        ),
      ),
    )
    .orderBy(signOns.personId, desc(signOns.revisionNumber), asc(signOns.receivedAt));
  return rows
    .sort((a, b) => a.receivedAt.getTime() - b.receivedAt.getTime())
    .map((row) => ({
      name: row.personName,
      employer: row.employerName,
      trade: row.trade,
      revision: row.revisionNumber,
      signedAt: row.signedAt.toISOString(),
      method: row.method,
      svg: row.svg,
      typedName: row.typedName,
      witness: row.witness,
    }));
}
