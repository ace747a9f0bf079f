import fc from 'fast-check';
import { Node as DocumentNode } from '@tiptap/pm/model';
import { describe, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { controlLevels, hazardCategories } from '#shared/library/block.ts';
import { noNeeds, noParticulars } from '#shared/statements/document/attributes.ts';
import { checkDocument, parseDocument, statementSchema } from '#shared/statements/document/document.ts';
import { documentFromBlocks } from '#shared/statements/document/from-block.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import { blockTemplates } from '../../../server/library/templates.ts';

/* Any statement that the schema allows, as an editor could have made it. */

const words = fc.stringMatching(/^[A-Za-zé’ ]{1,30}$/).filter((text) => text.trim() === text && text !== '');
const text = words.map((value): NodeJson => ({ type: 'text', text: value }));
const fillIn = fc
  .record({ label: words, value: fc.oneof(fc.constant(''), words) })
  .map((given): NodeJson => ({
    type: 'fillIn',
    attrs: { id: newId(), kind: 'text', unit: '', choices: [], help: '', ...given },
  }));
const inline = fc.oneof(
  fc.constant([] as NodeJson[]),
  text.map((one) => [one]),
  fc.tuple(text, fillIn).map((both) => both as NodeJson[]),
);
const holding = (type: string, attrs?: () => Record<string, unknown>) =>
  inline.map((content): NodeJson => ({
    type,
    ...(attrs ? { attrs: attrs() } : {}),
    ...(content.length > 0 ? { content } : {}),
  }));
const paragraph = holding('paragraph');
const origin = () => ({ id: newId(), origin: null });
const rating = fc.option(
  fc.record({ likelihood: fc.constantFrom('A', 'C', 'E'), consequence: fc.integer({ min: 1, max: 5 }) }),
);
const control = fc
  .tuple(inline, fc.constantFrom(...controlLevels), words)
  .map(([content, level, role]): NodeJson => ({
    type: 'control',
    attrs: { ...origin(), level, role, check: '' },
    ...(content.length > 0 ? { content } : {}),
  }));
const hazard = fc
  .tuple(
    holding('hazardTitle'),
    fc.array(fc.oneof(paragraph, control), { maxLength: 4 }),
    rating,
    rating,
    fc.constantFrom(...hazardCategories),
  )
  .map(([title, rest, initial, residual, category]): NodeJson => ({
    type: 'hazard',
    attrs: { ...origin(), category, initial, residual },
    content: [title, ...rest],
  }));
const step = fc
  .tuple(
    holding('stepTitle'),
    fc.array(
      fc.oneof(
        paragraph,
        hazard,
        holding('stopIf', origin),
        holding('holdPoint', () => ({ ...origin(), releasedBy: '' })),
      ),
      { maxLength: 4 },
    ),
  )
  .map(([title, rest]): NodeJson => ({
    type: 'step',
    attrs: { ...origin(), card: '', needs: noNeeds, questions: [], sources: [], caution: '' },
    content: [title, ...rest],
  }));
const statement = fc.array(fc.oneof(paragraph, step), { maxLength: 5 }).map((rest): NodeJson => ({
  type: 'doc',
  content: [{ type: 'titleBlock', attrs: noParticulars }, ...rest],
}));

describe('the document', () => {
  test('any statement that the schema allows is found without fault, and comes back from the editor’s form as it was', () => {
    fc.assert(
      fc.property(statement, (json) => {
        expect(checkDocument(json)).toEqual([]);
        const node = DocumentNode.fromJSON(statementSchema(), json);
        expect(JSON.parse(JSON.stringify(node.toJSON()))).toEqual(json);
      }),
    );
  });

  test('the outline holds every word of the document, in order', () => {
    fc.assert(
      fc.property(statement, (json) => {
        const outline = outlineOf(json);
        const told = JSON.stringify(outline);
        const every = textsOf(json);
        for (const word of every) expect(told).toContain(JSON.stringify(word).slice(1, -1));
        expect(outline.steps.length).toBe(json.content?.filter(({ type }) => type === 'step').length);
        expect(outline.fillIns.length).toBe(countOf(json, 'fillIn'));
        expect(
          outline.steps.flatMap(({ hazards }) => hazards.flatMap(({ controls }) => controls)).length,
        ).toBe(countOf(json, 'control'));
      }),
    );
  });

  test('anything of another kind put anywhere is refused, naming a place', () => {
    fc.assert(
      fc.property(
        statement,
        fc.nat(),
        fc.constantFrom('video', 'titleBlock', 'doc', 'listItem'),
        (json, at, type) => {
          const spoilt = structuredClone(json);
          const holders = holdersOf(spoilt);
          const holder = holders[at % holders.length];
          holder?.content?.push({ type, ...(type === 'titleBlock' ? { attrs: noParticulars } : {}) });

          const faults = checkDocument(spoilt);

          expect(faults.length).toBeGreaterThan(0);
          expect(faults[0]?.place).not.toBe('');
          expect(() => parseDocument(spoilt)).toThrow(/does not fit at/);
        },
      ),
    );
  });
});

describe('blocks of the library', () => {
  test.each(blockTemplates().map((block) => [block.id, block] as const))(
    '%s becomes steps that fit, with every fill-in open',
    (_id, block) => {
      const document = documentFromBlocks([block]);

      expect(checkDocument(document)).toEqual([]);
      const outline = outlineOf(document);
      expect(outline.steps.map(({ title }) => title)).toEqual(block.steps.map(({ title }) => title));
      expect(outline.fillIns.every(({ value }) => value === '')).toBe(true);
      expect(new Set(outline.fillIns.map(({ label }) => label))).toEqual(
        new Set(block.fillIns.map(({ label }) => label)),
      );
    },
  );

  test('two of one block in a statement share no id', () => {
    const block = blockTemplates()[0];
    if (!block) throw new Error('There is no block.');

    expect(checkDocument(documentFromBlocks([block, block]))).toEqual([]);
  });
});

const textsOf = (node: NodeJson): string[] =>
  node.type === 'text' ? [node.text ?? ''] : (node.content ?? []).flatMap(textsOf);
const countOf = (node: NodeJson, type: string): number =>
  (node.type === type ? 1 : 0) + (node.content ?? []).reduce((sum, child) => sum + countOf(child, type), 0);
const holdersOf = (node: NodeJson): NodeJson[] => [
  ...(node.content ? [node] : []),
  ...(node.content ?? []).flatMap(holdersOf),
];
