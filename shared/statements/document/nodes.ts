import { type Attributes, type Extensions, Node, mergeAttributes } from '@tiptap/core';
import { StarterKit } from '@tiptap/starter-kit';
import { noNeeds, noParticulars } from './attributes.ts';
import { fillInText } from './fill-in-text.ts';

/** Attributes kept as JSON in `data-…`, so that copying within the editor and between statements keeps them whole. */
function jsonAttributes(defaults: Record<string, unknown>): Attributes {
  return Object.fromEntries(
    Object.entries(defaults).map(([name, fallback]) => {
      const dataName = `data-${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
      return [
        name,
        {
          default: fallback,
          parseHTML: (element: HTMLElement): unknown => {
            const text = element.getAttribute(dataName);
            return text === null ? fallback : readJson(text, fallback);
          },
          renderHTML: (attributes: Record<string, unknown>) => ({
            [dataName]: JSON.stringify(attributes[name]),
          }),
        },
      ];
    }),
  );
}

function readJson(text: string, fallback: unknown): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return fallback;
  }
}

/** What may stand between the title block and the steps, and inside a step or hazard: ordinary prose. */
const prose = '(paragraph | bulletList | orderedList)';

export const TitleBlock = Node.create({
  name: 'titleBlock',
  atom: true,
  selectable: false,
  draggable: false,
  addAttributes: () => jsonAttributes(noParticulars),
  parseHTML: () => [{ tag: 'header[data-node="titleBlock"]' }],
  renderHTML: ({ HTMLAttributes }) => [
    'header',
    mergeAttributes({ 'data-node': 'titleBlock' }, HTMLAttributes),
  ],
});

export const Document = Node.create({
  name: 'doc',
  topNode: true,
  content: `titleBlock (heading | ${prose} | step)*`,
});

export const Step = Node.create({
  name: 'step',
  content: `stepTitle (${prose} | hazard | stopIf | holdPoint)*`,
  defining: true,
  isolating: true,
  draggable: true,
  addAttributes: () =>
    jsonAttributes({
      id: null,
      origin: null,
      card: '',
      needs: noNeeds,
      questions: [],
      sources: [],
      caution: '',
    }),
  parseHTML: () => [{ tag: 'section[data-node="step"]' }],
  renderHTML: ({ HTMLAttributes }) => [
    'section',
    mergeAttributes({ 'data-node': 'step' }, HTMLAttributes),
    0,
  ],
});

export const StepTitle = Node.create({
  name: 'stepTitle',
  content: 'inline*',
  marks: '',
  defining: true,
  parseHTML: () => [{ tag: 'h2[data-node="stepTitle"]' }],
  renderHTML: () => ['h2', { 'data-node': 'stepTitle' }, 0],
});

export const Hazard = Node.create({
  name: 'hazard',
  content: `hazardTitle (${prose} | control)*`,
  defining: true,
  isolating: true,
  draggable: true,
  addAttributes: () =>
    jsonAttributes({ id: null, origin: null, category: 'other', initial: null, residual: null }),
  parseHTML: () => [{ tag: 'section[data-node="hazard"]' }],
  renderHTML: ({ HTMLAttributes }) => [
    'section',
    mergeAttributes({ 'data-node': 'hazard' }, HTMLAttributes),
    0,
  ],
});

export const HazardTitle = Node.create({
  name: 'hazardTitle',
  content: 'inline*',
  marks: '',
  defining: true,
  parseHTML: () => [{ tag: 'h3[data-node="hazardTitle"]' }],
  renderHTML: () => ['h3', { 'data-node': 'hazardTitle' }, 0],
});

export const Control = Node.create({
  name: 'control',
  content: 'inline*',
  defining: true,
  draggable: true,
  addAttributes: () =>
    jsonAttributes({ id: null, origin: null, level: 'administrative', role: '', check: '' }),
  parseHTML: () => [{ tag: 'p[data-node="control"]', priority: 60 }],
  renderHTML: ({ HTMLAttributes }) => ['p', mergeAttributes({ 'data-node': 'control' }, HTMLAttributes), 0],
});

export const StopIf = Node.create({
  name: 'stopIf',
  content: 'inline*',
  defining: true,
  addAttributes: () => jsonAttributes({ id: null, origin: null }),
  parseHTML: () => [{ tag: 'p[data-node="stopIf"]', priority: 60 }],
  renderHTML: ({ HTMLAttributes }) => ['p', mergeAttributes({ 'data-node': 'stopIf' }, HTMLAttributes), 0],
});

export const HoldPoint = Node.create({
  name: 'holdPoint',
  content: 'inline*',
  defining: true,
  addAttributes: () => jsonAttributes({ id: null, origin: null, releasedBy: '' }),
  parseHTML: () => [{ tag: 'p[data-node="holdPoint"]', priority: 60 }],
  renderHTML: ({ HTMLAttributes }) => ['p', mergeAttributes({ 'data-node': 'holdPoint' }, HTMLAttributes), 0],
});

export const FillIn = Node.create({
  name: 'fillIn',
  group: 'inline',
  inline: true,
  atom: true,
  addAttributes: () =>
    jsonAttributes({ id: null, label: 'fill in', kind: 'text', unit: '', choices: [], help: '', value: '' }),
  parseHTML: () => [{ tag: 'span[data-node="fillIn"]' }],
  renderHTML: ({ node, HTMLAttributes }) => [
    'span',
    mergeAttributes({ 'data-node': 'fillIn' }, HTMLAttributes),
    fillInText(node.attrs),
  ],
  renderText: ({ node }) => fillInText(node.attrs),
});

/** The whole schema of a statement. The editor takes these and adds behaviour; the server validates with them. */
export const documentExtensions: Extensions = [
  StarterKit.configure({
    document: false,
    blockquote: false,
    code: false,
    codeBlock: false,
    horizontalRule: false,
    link: false,
    strike: false,
    underline: false,
    trailingNode: false,
    heading: { levels: [1, 2, 3] },
  }),
  Document,
  TitleBlock,
  Step,
  StepTitle,
  Hazard,
  HazardTitle,
  Control,
  StopIf,
  HoldPoint,
  FillIn,
];
