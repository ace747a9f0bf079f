import * as api from '#shared/statements/statements.api.ts';
import type { Client } from './server.ts';

/** The demo organisation's issued statement. */
export async function demoStatement(reader: Client): Promise<api.Statement> {
  const { statements } = await reader.call(api.listStatements, { query: { search: 'Lot 7' } });
  return reader.call(api.getStatement, { params: { id: statements[0]?.id ?? '' } });
}

/** Revises the demo statement as it stands, has it submitted and issued as the next revision. */
export async function issueNextRevision(
  { supervisor, officer }: { supervisor: Client; officer: Client },
  change: { material: boolean; changeNote: string },
): Promise<api.Statement> {
  const { id, lockVersion } = await demoStatement(supervisor);
  const params = { id };
  const draft = await supervisor.call(api.reviseStatement, { params, body: { lockVersion } });
  const submitted = await supervisor.call(api.submitDraft, {
    params,
    body: { lockVersion: draft.lockVersion },
  });
  return officer.call(api.issueStatement, {
    params,
    body: { lockVersion: submitted.lockVersion, ...change },
  });
}
