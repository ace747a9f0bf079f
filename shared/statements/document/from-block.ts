import { newId } from '../../kernel/ids.ts';
import type { Block } from '../../library/block.ts';
import { type Needs, type Origin, noNeeds, noParticulars } from './attributes.ts';
import type { NodeJson } from './json.ts';

/** A statement with nothing in it but an untouched title block. */
export function emptyDocument(): NodeJson {
  return { type: 'doc', content: [{ type: 'titleBlock', attrs: { ...noParticulars } }] };
}

/** A document made of blocks, one after another, with the high risk work that they name ticked. */
export function documentFromBlocks(blocks: Block[]): NodeJson {
  const highRisk = [...new Set(blocks.flatMap((block) => block.highRisk))].sort();
  return {
    type: 'doc',
    content: [{ type: 'titleBlock', attrs: { ...noParticulars, highRisk } }, ...blocks.flatMap(stepsOfBlock)],
  };
}

/** The steps that a block brings, with new ids, each passage remembering where it came from. */
export function stepsOfBlock(block: Block): NodeJson[] {
  return block.steps.map((step, index) => {
    const origin = (passage: string): Origin => ({ block: block.id, version: block.version, passage });
    const say = (text: string) => inlineOf(text, block);
    const first = index === 0;
    return {
      type: 'step',
      attrs: {
        id: newId(),
        origin: origin(step.key),
        card: step.card,
        // What the block needs as a whole is told once, on its first step.
        needs: first ? needsOf(block) : { ...noNeeds },
        questions: first ? block.questions : [],
        sources: first ? block.sources : [],
        caution: first ? block.caution : '',
      },
      content: [
        { type: 'stepTitle', content: [{ type: 'text', text: step.title }] },
        ...step.text.map((line) => ({ type: 'paragraph', content: say(line) })),
        ...step.hazards.map((hazard) => ({
          type: 'hazard',
          attrs: {
            id: newId(),
            origin: origin(`${step.key}.${hazard.key}`),
            category: hazard.category,
            initial: hazard.initial,
            residual: hazard.residual,
          },
          content: [
            { type: 'hazardTitle', content: say(hazard.title) },
            { type: 'paragraph', content: say(`${hazard.causes} ${hazard.consequences}`) },
            ...hazard.controls.map((control) => ({
              type: 'control',
              attrs: {
                id: newId(),
                origin: origin(`${step.key}.${hazard.key}.${control.key}`),
                level: control.level,
                role: control.role,
                check: control.check,
              },
              content: say(control.text),
            })),
          ],
        })),
        ...step.holdPoints.map((point) => ({
          type: 'holdPoint',
          attrs: { id: newId(), origin: origin(`${step.key}.${point.key}`), releasedBy: point.releasedBy },
          content: say(point.text),
        })),
        ...step.stopIf.map((text, position) => ({
          type: 'stopIf',
          attrs: { id: newId(), origin: origin(`${step.key}.stop${position + 1}`) },
          content: say(text),
        })),
      ],
    };
  });
}

function needsOf({ protective, competencies, equipment, permits }: Block): Needs {
  return { protective, competencies, equipment, permits };
}

/** Words with `{{key}}` become text and fill-ins. */
function inlineOf(text: string, block: Block): NodeJson[] {
  return text
    .split(/(\{\{.*?\}\})/)
    .filter((part) => part !== '')
    .map((part) => {
      const key = /^\{\{(.*)\}\}$/.exec(part)?.[1];
      const fillIn = block.fillIns.find((candidate) => candidate.key === key);
      if (!fillIn) return { type: 'text', text: part };
      return {
        type: 'fillIn',
        attrs: {
          id: newId(),
          label: fillIn.label,
          kind: fillIn.kind,
          unit: fillIn.unit ?? '',
          choices: fillIn.choices ?? [],
          help: fillIn.help ?? '',
          value: '',
        },
      };
    });
}
