import type { RegisterRow } from '#shared/signons/register.api.ts';

export type Counts = { current: number; older: number; none: number };

export function countsOf(rows: Pick<RegisterRow, 'status'>[]): Counts {
  const counts = { current: 0, older: 0, none: 0 };
  for (const { status } of rows) counts[status] += 1;
  return counts;
}

/** "5 of 9 have signed revision 2; 1 signed an older revision; 3 have not signed." */
export function countsInWords({ current, older, none }: Counts, revision: number): string {
  const all = current + older + none;
  const parts = [`${current} of ${all} ${current === 1 ? 'has' : 'have'} signed revision ${revision}`];
  if (older > 0) parts.push(`${older} signed an older revision`);
  if (none > 0) parts.push(`${none} ${none === 1 ? 'has' : 'have'} not signed`);
  return `${parts.join('; ')}.`;
}

export type StatementGroup = Pick<
  RegisterRow,
  'statementId' | 'statement' | 'siteId' | 'site' | 'currentRevision'
> & { rows: RegisterRow[] };

/** Rows by statement, in the order in which the statements first come. */
export function groupsOf(rows: RegisterRow[]): StatementGroup[] {
  const groups = new Map<string, StatementGroup>();
  for (const row of rows) {
    const { statementId, statement, siteId, site, currentRevision } = row;
    const group = groups.get(statementId) ?? {
      statementId,
      statement,
      siteId,
      site,
      currentRevision,
      rows: [],
    };
    group.rows.push(row);
    groups.set(statementId, group);
  }
  return [...groups.values()];
}

/** "2 min 05 s", "40 s" */
export function durationInWords(ms: number): string {
  const seconds = Math.round(ms / 1000);
  const minutes = Math.floor(seconds / 60);
  return minutes === 0 ? `${seconds} s` : `${minutes} min ${String(seconds % 60).padStart(2, '0')} s`;
}
