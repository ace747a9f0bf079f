import type { ReactNode } from 'react';
import type { FillIn } from '../statements/document/attributes.ts';
import type { NodeJson } from '../statements/document/json.ts';
import { fillInText } from '../statements/document/fill-in-text.ts';

/** The inline content of a node: text with its marks, fill-ins, line breaks. */
export function Inline({ node }: { node: NodeJson | undefined }) {
  return (
    <>
      {(node?.content ?? []).map((child, index) => (
        <InlineNode key={index} node={child} />
      ))}
    </>
  );
}

function InlineNode({ node }: { node: NodeJson }): ReactNode {
  if (node.type === 'hardBreak') return <br />;
  if (node.type === 'fillIn') {
    const fillIn = node.attrs as FillIn;
    return <span className={fillIn.value ? 'filled' : 'hole'}>{fillInText(fillIn)}</span>;
  }
  return (node.marks ?? []).reduce<ReactNode>((inner, { type }) => {
    if (type === 'bold') return <strong>{inner}</strong>;
    if (type === 'italic') return <em>{inner}</em>;
    return inner;
  }, node.text ?? '');
}

/** Paragraphs, lists and headings; any other node is left to whoever draws it. */
export function Prose({ node }: { node: NodeJson }) {
  if (node.type === 'paragraph')
    return node.content ? (
      <p>
        <Inline node={node} />
      </p>
    ) : null;
  if (node.type === 'heading')
    return (
      <h2 className="free">
        <Inline node={node} />
      </h2>
    );
  if (node.type === 'bulletList') return <ul>{items(node)}</ul>;
  if (node.type === 'orderedList')
    return <ol start={node.attrs?.start as number | undefined}>{items(node)}</ol>;
  return null;
}

const items = (list: NodeJson) =>
  (list.content ?? []).map((item, index) => (
    <li key={index}>
      {(item.content ?? []).map((child, at) => (
        <Prose key={at} node={child} />
      ))}
    </li>
  ));

export const childrenOf = (node: NodeJson, ...types: string[]): NodeJson[] =>
  (node.content ?? []).filter(({ type }) => types.includes(type));

export const proseTypes = ['paragraph', 'bulletList', 'orderedList'];
