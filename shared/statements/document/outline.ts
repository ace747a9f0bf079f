import type { CheckQuestion, ControlLevel, HazardCategory } from '../../library/block.ts';
import type { Rating } from '../../risk/matrix.ts';
import type { FillIn, Needs, Origin, Particulars } from './attributes.ts';
import type { NodeJson } from './json.ts';
import { fillInText } from './fill-in-text.ts';

export type OutlineControl = {
  id: string;
  text: string;
  level: ControlLevel;
  role: string;
  check: string;
  origin: Origin | null;
};

export type OutlineHazard = {
  id: string;
  title: string;
  category: HazardCategory;
  prose: string[];
  initial: Rating | null;
  residual: Rating | null;
  controls: OutlineControl[];
  origin: Origin | null;
};

export type OutlineSource = { title: string; locator: string; verified: string };

export type OutlineStep = {
  id: string;
  number: number;
  title: string;
  prose: string[];
  card: string;
  hazards: OutlineHazard[];
  stopIf: string[];
  holdPoints: { id: string; text: string; releasedBy: string }[];
  needs: Needs;
  questions: CheckQuestion[];
  sources: OutlineSource[];
  caution: string;
  origin: Origin | null;
};

export type OutlineFillIn = FillIn & { stepId: string | null; stepNumber: number | null };

/** What everything but the editor reads of a statement: steps, hazards and controls, typed, with running text. */
export type Outline = {
  particulars: Particulars;
  /** Prose outside the steps, in order. */
  prose: string[];
  steps: OutlineStep[];
  fillIns: OutlineFillIn[];
  words: number;
};

/** Reads the outline of a document that fits the schema. */
export function outlineOf(document: NodeJson): Outline {
  const outline: Outline = {
    particulars: (document.content?.[0]?.attrs ?? {}) as Particulars,
    prose: [],
    steps: [],
    fillIns: [],
    words: 0,
  };
  for (const node of document.content ?? []) {
    if (node.type === 'titleBlock') continue;
    if (node.type === 'step') outline.steps.push(stepOf(node, outline.steps.length + 1));
    else outline.prose.push(...proseOf(node));
    collectFillIns(node, node.type === 'step' ? (outline.steps.at(-1) ?? null) : null, outline.fillIns);
  }
  outline.words = countWords(outline);
  return outline;
}

const children = (node: NodeJson, type: string) =>
  (node.content ?? []).filter((child) => child.type === type);

function stepOf(node: NodeJson, number: number): OutlineStep {
  const attributes = node.attrs as Omit<
    OutlineStep,
    'number' | 'title' | 'prose' | 'hazards' | 'stopIf' | 'holdPoints'
  >;
  return {
    id: attributes.id,
    number,
    title: textOf(children(node, 'stepTitle')[0]),
    prose: (node.content ?? []).flatMap(proseOf),
    card: attributes.card,
    hazards: children(node, 'hazard').map(hazardOf),
    stopIf: children(node, 'stopIf').map(textOf).filter(Boolean),
    holdPoints: children(node, 'holdPoint').map((point) => ({
      id: point.attrs?.id as string,
      text: textOf(point),
      releasedBy: point.attrs?.releasedBy as string,
    })),
    needs: attributes.needs,
    questions: attributes.questions,
    sources: attributes.sources,
    caution: attributes.caution,
    origin: attributes.origin,
  };
}

function hazardOf(node: NodeJson): OutlineHazard {
  const attributes = node.attrs as Pick<OutlineHazard, 'id' | 'category' | 'initial' | 'residual' | 'origin'>;
  return {
    id: attributes.id,
    title: textOf(children(node, 'hazardTitle')[0]),
    category: attributes.category,
    prose: (node.content ?? []).flatMap(proseOf),
    initial: attributes.initial,
    residual: attributes.residual,
    controls: children(node, 'control').map((control) => ({
      ...(control.attrs as Omit<OutlineControl, 'text'>),
      text: textOf(control),
    })),
    origin: attributes.origin,
  };
}

/** Running text of an inline-holding node, fill-ins included. */
export function textOf(node: NodeJson | undefined): string {
  if (!node) return '';
  if (node.type === 'text') return node.text ?? '';
  if (node.type === 'fillIn') return fillInText(node.attrs as FillIn);
  if (node.type === 'hardBreak') return '\n';
  return (node.content ?? []).map(textOf).join('').trim();
}

/** Paragraphs, headings and list items of a node, one string each; steps, hazards and their own parts are left out. */
function proseOf(node: NodeJson): string[] {
  if (node.type === 'paragraph' || node.type === 'heading') return [textOf(node)].filter(Boolean);
  if (node.type === 'bulletList' || node.type === 'orderedList' || node.type === 'listItem')
    return (node.content ?? []).flatMap(proseOf);
  return [];
}

function collectFillIns(node: NodeJson, step: OutlineStep | null, found: OutlineFillIn[]): void {
  if (node.type === 'fillIn')
    found.push({ ...(node.attrs as FillIn), stepId: step?.id ?? null, stepNumber: step?.number ?? null });
  for (const child of node.content ?? []) collectFillIns(child, step, found);
}

/** Words that a reader of the whole statement reads; the floor of an honest reading time. */
function countWords({ prose, steps }: Outline): number {
  const texts = [
    ...prose,
    ...steps.flatMap((step) => [
      step.title,
      ...step.prose,
      ...step.stopIf,
      ...step.holdPoints.map(({ text }) => text),
      ...step.hazards.flatMap((hazard) => [
        hazard.title,
        ...hazard.prose,
        ...hazard.controls.map(({ text }) => text),
      ]),
    ]),
  ];
  return texts.reduce((sum, text) => sum + (text.match(/\S+/g)?.length ?? 0), 0);
}
