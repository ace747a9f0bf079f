import { getSchema } from '@tiptap/core';
import { Node as DocumentNode, type Schema } from '@tiptap/pm/model';
import type { z } from 'zod';
import { Refusal } from '../../kernel/refusal.ts';
import { attributesOf } from './attributes.ts';
import { documentFormat, type NodeJson } from './json.ts';
import { documentExtensions } from './nodes.ts';

let built: Schema | undefined;

/** The ProseMirror schema of a statement, built once. */
export function statementSchema(): Schema {
  built ??= getSchema(documentExtensions);
  return built;
}

/** One thing in a document that does not fit, and where it stands in words and as a path of indexes. */
export type Fault = { path: string; place: string; message: string };

const placeNames: Record<string, string> = {
  doc: 'the document',
  titleBlock: 'the title block',
  step: 'step',
  stepTitle: 'title',
  hazard: 'hazard',
  hazardTitle: 'title',
  control: 'control',
  stopIf: 'stop-if',
  holdPoint: 'hold point',
  fillIn: 'fill-in',
};

const deepest = 12;

/** Everything that keeps a document from fitting the schema; an empty list means it fits, and that nothing would be dropped. */
export function checkDocument(json: NodeJson): Fault[] {
  const faults: Fault[] = [];
  const ids = new Map<string, string>();
  if (json.type !== 'doc')
    return [{ path: '', place: 'the document', message: `A statement is a doc, not "${json.type}".` }];
  walk(json, '', 'the document', 0);
  return faults;

  function walk(node: NodeJson, path: string, place: string, depth: number): void {
    const fault = (message: string) => faults.push({ path, place, message });
    const type = statementSchema().nodes[node.type];
    if (!type) return void fault(`"${node.type}" is not part of a statement.`);
    if (depth > deepest) return void fault('This is nested too deeply.');
    if (type.isText) {
      if (!node.text) fault('Text without characters.');
      if (node.attrs ?? node.content) fault('Text has no attributes or content.');
    } else if (node.text !== undefined) fault(`A ${node.type} holds nodes, not bare text.`);
    checkAttributes(node, fault, place);
    checkMarks(node, fault);
    const children = node.content ?? [];
    const counts = new Map<string, number>();
    children.forEach((child, index) => {
      const count = (counts.get(child.type) ?? 0) + 1;
      counts.set(child.type, count);
      const name = placeNames[child.type] ?? child.type;
      const childPlace = place === 'the document' ? `${name} ${count}` : `${place}, ${name} ${count}`;
      walk(child, path === '' ? `content.${index}` : `${path}.content.${index}`, childPlace, depth + 1);
    });
    if (children.some((child) => !statementSchema().nodes[child.type])) return;
    let match: typeof type.contentMatch | null = type.contentMatch;
    for (const child of children) {
      const childType = statementSchema().nodes[child.type];
      match = match && childType ? match.matchType(childType) : null;
      if (!match) return void fault(`A ${node.type} can't hold a ${child.type} there.`);
    }
    if (match && !match.validEnd) fault(`A ${node.type} is missing something at its end.`);
  }

  function checkAttributes(node: NodeJson, fault: (message: string) => void, place: string): void {
    const attributes = attributesOf[node.type as keyof typeof attributesOf] as z.ZodType | undefined;
    if (!attributes) {
      const extra = Object.keys(node.attrs ?? {});
      if (extra.length > 0) fault(`A ${node.type} has no attribute "${extra[0]}".`);
      return;
    }
    const read = attributes.safeParse(node.attrs ?? {});
    if (!read.success) {
      for (const issue of read.error.issues)
        fault(`${[node.type, ...issue.path].join('.')}: ${issue.message}`);
      return;
    }
    const id = (node.attrs as { id?: string }).id;
    if (id === undefined) return;
    const other = ids.get(id);
    if (other !== undefined) fault(`Its id is the same as that of ${other}.`);
    ids.set(id, place);
  }

  function checkMarks(node: NodeJson, fault: (message: string) => void): void {
    for (const mark of node.marks ?? []) {
      if (!statementSchema().marks[mark.type]) fault(`"${mark.type}" is not a mark of a statement.`);
      if (Object.keys(mark.attrs ?? {}).length > 0) fault(`The mark ${mark.type} has no attributes.`);
    }
  }
}

/** The document as ProseMirror node. Refuses what does not fit, naming the places; nothing is dropped silently. */
export function parseDocument(json: NodeJson): DocumentNode {
  const faults = checkDocument(json);
  if (faults.length > 0) throw refuseFaults(faults);
  const node = DocumentNode.fromJSON(statementSchema(), json);
  try {
    node.check();
  } catch (error) {
    throw refuseFaults([{ path: '', place: 'the document', message: (error as Error).message }]);
  }
  return node;
}

function refuseFaults(faults: Fault[]): Refusal {
  const first = faults[0];
  const rest = faults.length > 1 ? ` (and ${faults.length - 1} more)` : '';
  return new Refusal('invalid', `The document does not fit at ${first?.place}: ${first?.message}${rest}`, {
    fields: Object.fromEntries(
      faults.slice(0, 50).map(({ path, place, message }) => [`document.${path}`, `${place}: ${message}`]),
    ),
  });
}

/** Brings a stored document of an earlier format to today's. Format 1 is the first. */
export function upgradeDocument(json: NodeJson, format: number): NodeJson {
  if (format !== documentFormat) throw new Error(`No way to read a document of format ${format}.`);
  return json;
}
