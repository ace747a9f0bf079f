import { newId } from '#shared/kernel/ids.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import * as api from '#shared/statements/statements.api.ts';
import type { Client, DemoWorld } from './server.ts';

/** The demo's issued statement as a document that is ready to be issued again. */
export async function readyDocument(world: DemoWorld, client: Client): Promise<NodeJson> {
  const { statements } = await client.call(api.listStatements, { query: { state: 'issued' } });
  const statement = await client.call(api.getStatement, { params: { id: statements[0]?.id ?? '' } });
  return structuredClone(statement.document);
}

/** A new draft at the demo's second site, holding this document. */
export async function draftWith(
  world: DemoWorld,
  client: Client,
  document: NodeJson,
  title = 'A draft of a test',
) {
  const id = newId();
  const siteId = world.seeded.sites.get('quarry') ?? '';
  await client.call(api.createStatement, { params: { id }, body: { siteId, title, starterId: null } });
  await client.call(api.saveDraft, { params: { id }, body: { lockVersion: 1, title, document } });
  return { id, lockVersion: 2 };
}

/** Changes every node of a document; the change returns the node to stand in its place, or null to leave it out. */
export function mapNodes(node: NodeJson, change: (node: NodeJson) => NodeJson | null): NodeJson {
  const changed = change(node) ?? node;
  if (!changed.content) return changed;
  return {
    ...changed,
    content: changed.content.flatMap((child) => (change(child) === null ? [] : [mapNodes(child, change)])),
  };
}

/** Changes the particulars on the title block. */
export function withParticulars(document: NodeJson, particulars: Record<string, unknown>): NodeJson {
  return mapNodes(document, (node) =>
    node.type === 'titleBlock' ? { ...node, attrs: { ...node.attrs, ...particulars } } : node,
  );
}
