import { describe, expect, test } from 'vitest';
import { blockSchema, controlTier, type Block } from '#shared/library/block.ts';
import { bandOf, compareBands, matrixSchema } from '#shared/risk/matrix.ts';
import { filesOf, stringsIn, vagueWords } from './files.ts';
import { countsOf, readingGrade } from './reading-grade.ts';

const files = filesOf('blocks').map(({ file, json }) => ({ file, ...blockSchema.safeParse(json) }));
const blocks = files.flatMap(({ data }) => (data ? [data] : []));
const matrix = matrixSchema.parse(filesOf('matrices').find(({ file }) => file === 'as4360-1999.json')?.json);

const hazardsOf = (block: Block) =>
  block.steps.flatMap((step) => step.hazards.map((hazard) => ({ step, hazard })));
/** Everything said in a block, except where its facts come from. */
const wordsOf = ({ sources: _sources, ...said }: Block) => stringsIn(said);

test('every file is a block of its name', () => {
  expect(files.length).toBeGreaterThanOrEqual(45);
  expect(
    files.filter(({ success }) => !success).map(({ file, error }) => `${file}: ${error?.message}`),
  ).toEqual([]);
  expect(files.map(({ data }) => `${data?.id}.json`)).toEqual(files.map(({ file }) => file));
});

test('two files that say the same of a source agree on how it was verified', () => {
  const seen = new Map<string, string>();
  for (const { title, locator, verified } of blocks.flatMap(({ sources }) => sources)) {
    const name = `${title}, ${locator}`;
    expect([name, verified]).toEqual([name, seen.get(name) ?? verified]);
    seen.set(name, verified);
  }
});

test('no passage of more than 25 words stands in two blocks', () => {
  const owner = new Map<string, string>();
  for (const block of blocks)
    for (const text of wordsOf(block)) {
      const words = text.toLowerCase().match(/[\p{L}\p{N}’{}]+/gu) ?? [];
      for (let start = 0; start + 26 <= words.length; start += 1) {
        const passage = words.slice(start, start + 26).join(' ');
        expect([passage, owner.get(passage) ?? block.id]).toEqual([passage, block.id]);
        owner.set(passage, block.id);
      }
    }
});

test('a block that points at another names one that exists', () => {
  const titles = new Set(blocks.map(({ title }) => title));
  const named = blocks.flatMap((block) =>
    wordsOf(block).flatMap((text) => [...text.matchAll(/\bblocks? “(.*?)”/g)].map((match) => match[1] ?? '')),
  );

  expect(named.length).toBeGreaterThan(0);
  expect(named.filter((title) => !titles.has(title))).toEqual([]);
});

/** law.md 1b: what happens to a frame crew usually, sometimes, on additions or on mixed builds. */
test('every high risk category that a frame crew can meet is named by a block', () => {
  const named = new Set(blocks.flatMap(({ highRisk }) => highRisk));

  expect(['a', 'c', 'd', 'e', 'g', 'i', 'k', 'm', 'n', 'o'].filter((letter) => !named.has(letter))).toEqual(
    [],
  );
});

test('the right answer does not always stand in the same place', () => {
  const places = new Set(blocks.flatMap(({ questions }) => questions.map(({ right }) => right)));

  expect(places.size).toBeGreaterThanOrEqual(3);
});

describe.each(blocks.map((block) => [block.id, block] as const))('block %s', (_id, block) => {
  test('it has 1 to 3 steps with 1 to 4 hazards, 3 to 7 controls a hazard, 3 to 6 talk points', () => {
    const sizes = {
      steps: block.steps.length,
      hazards: block.steps.map(({ hazards }) => hazards.length),
      controls: hazardsOf(block).map(({ hazard }) => hazard.controls.length),
      talkPoints: block.talkPoints.length,
    };

    expect(sizes.steps).toBeLessThanOrEqual(3);
    expect(sizes.hazards.filter((count) => count > 4)).toEqual([]);
    expect(sizes.controls.filter((count) => count < 3 || count > 7)).toEqual([]);
    expect(sizes.talkPoints).toBeLessThanOrEqual(6);
  });

  test('the keys of its passages are unique where they meet', () => {
    const passages = block.steps.flatMap((step) => [
      step.key,
      ...step.holdPoints.map((point) => `${step.key}.${point.key}`),
      ...step.hazards.flatMap((hazard) => [
        `${step.key}.${hazard.key}`,
        ...hazard.controls.map((control) => `${step.key}.${hazard.key}.${control.key}`),
      ]),
    ]);

    expect(passages.filter((passage, index) => passages.indexOf(passage) !== index)).toEqual([]);
  });

  test('its controls run down the tiers of reg 36, with one above administrative, each with how it is checked', () => {
    for (const { hazard } of hazardsOf(block)) {
      const tiers = hazard.controls.map(({ level }) => controlTier[level]);
      expect([hazard.key, tiers]).toEqual([hazard.key, tiers.toSorted()]);
      expect([hazard.key, (tiers[0] ?? 9) < 3]).toEqual([hazard.key, true]);
      expect(hazard.controls.filter(({ check }) => check === '').map(({ key }) => key)).toEqual([]);
    }
  });

  test('every hazard is a lesser band after its controls, or low, and never extreme', () => {
    for (const { hazard } of hazardsOf(block)) {
      const before = bandOf(matrix, hazard.initial);
      const after = bandOf(matrix, hazard.residual);
      if (!before || !after) throw new Error(`${hazard.key} is not on the matrix`);
      expect([hazard.key, compareBands(after, before) < 0 || before === 'low']).toEqual([hazard.key, true]);
      expect([hazard.key, after]).not.toEqual([hazard.key, 'extreme']);
      expect(hazard.residual.likelihood >= hazard.initial.likelihood).toBe(true);
      expect(hazard.residual.consequence).toBeLessThanOrEqual(hazard.initial.consequence);
    }
  });

  /** law.md 2.14: administrative controls and protective equipment alone do not make the harm less. */
  test('the consequence falls only where a control is above administrative', () => {
    for (const { hazard } of hazardsOf(block)) {
      const soft = hazard.controls.every(({ level }) => controlTier[level] >= 3);
      if (soft) expect(hazard.residual.consequence).toBe(hazard.initial.consequence);
    }
  });

  test('no words leave the control to whoever reads them', () => {
    expect(wordsOf(block).filter((text) => vagueWords.test(text))).toEqual([]);
  });

  /** law.md 4.39: harness chosen, rescue required. */
  test('where a control names a harness, the block names the rescue', () => {
    const controls = hazardsOf(block).flatMap(({ hazard }) => hazard.controls.map(({ text }) => text));
    if (controls.some((text) => /harness|lanyard|fall.arrest/i.test(text)))
      expect(wordsOf(block).join(' ')).toMatch(/rescue/i);
  });

  test('each card reads at grade 8 or less, without fill-ins', () => {
    for (const { key, card } of block.steps) {
      expect(readingGrade(countsOf(card)), key).toBeLessThanOrEqual(8);
      expect(card).not.toContain('{{');
    }
  });

  test('fill-ins stand once each, and only where the editor shows them', () => {
    const shown = JSON.stringify(block.steps);
    for (const { key } of block.fillIns) expect([key, shown.split(`{{${key}}}`).length]).toEqual([key, 2]);
    const plain = block.steps.flatMap(({ title, card, hazards, holdPoints }) => [
      title,
      card,
      ...holdPoints.map(({ releasedBy }) => releasedBy),
      ...hazards.flatMap(({ controls }) => controls.flatMap(({ role, check }) => [role, check])),
    ]);
    expect(plain.filter((text) => text.includes('{{'))).toEqual([]);
  });

  test('its questions have different answers, and its high risk letters are told once, in order', () => {
    for (const { answers } of block.questions) expect(new Set(answers).size).toBe(answers.length);
    expect(block.highRisk).toEqual([...new Set(block.highRisk)].sort());
  });
});
