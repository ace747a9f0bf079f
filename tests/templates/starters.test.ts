import { expect, test } from 'vitest';
import { blockSchema } from '#shared/library/block.ts';
import { starterSchema } from '#shared/library/starter.ts';
import { talkTopicSchema } from '#shared/library/talk-topic.ts';
import { profileSchema } from '#shared/profiles/profile.ts';
import { matrixSchema } from '#shared/risk/matrix.ts';
import { checkDocument } from '#shared/statements/document/document.ts';
import { documentFromBlocks } from '#shared/statements/document/from-block.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import { gapsBeforeIssue } from '#shared/statements/readiness.ts';
import { filesOf, stringsIn, vagueWords } from './files.ts';

const blocks = new Map(
  filesOf('blocks').map(({ json }) => {
    const block = blockSchema.parse(json);
    return [block.id, block] as const;
  }),
);
const starters = filesOf('starters').map(({ file, json }) => ({ file, starter: starterSchema.parse(json) }));
const talks = filesOf('talks').map(({ file, json }) => ({ file, talk: talkTopicSchema.parse(json) }));

const jsonOf = (folder: string, name: string) => filesOf(folder).find(({ file }) => file === name)?.json;
const unknown = (ids: string[]) => ids.filter((id) => !blocks.has(id));
const repeated = (ids: string[]) => ids.filter((id, index) => ids.indexOf(id) !== index);

test('every starter has the name of its file and is made of blocks that exist, each once', () => {
  expect(starters.length).toBeGreaterThanOrEqual(8);
  for (const { file, starter } of starters) {
    expect(`${starter.id}.json`).toBe(file);
    expect([file, unknown(starter.blocks), repeated(starter.blocks)]).toEqual([file, [], []]);
  }
});

test('a starter names the high risk work of its blocks', () => {
  for (const { file, starter } of starters) {
    const letters = starter.blocks.flatMap((id) => blocks.get(id)?.highRisk ?? []);
    expect([file, starter.highRisk]).toEqual([file, [...new Set(letters)].sort()]);
  }
});

test('a statement made from a starter fits the schema and lacks only its particulars and its fill-ins', () => {
  const profile = profileSchema.parse(jsonOf('profiles', 'au-model.json'));
  const matrix = matrixSchema.parse(jsonOf('matrices', 'as4360-1999.json'));
  for (const { file, starter } of starters) {
    const chosen = starter.blocks.flatMap((id) => blocks.get(id) ?? []);

    const document = documentFromBlocks(chosen);

    const outline = outlineOf(document);
    const lacking = gapsBeforeIssue(outline, { profile, matrix });
    expect([file, checkDocument(document)]).toEqual([file, []]);
    expect([file, outline.steps.length]).toEqual([file, chosen.flatMap((block) => block.steps).length]);
    expect(lacking.filter(({ rule, place }) => rule !== 'fillIn' && place.kind !== 'titleBlock')).toEqual([]);
    expect(lacking.filter(({ rule }) => rule === 'fillIn')).toHaveLength(
      chosen.flatMap((block) => block.fillIns).length,
    );
  }
});

test('a starter ends in an emergency plan', () => {
  for (const { starter } of starters) expect(starter.blocks).toContain('emergency-and-rescue');
});

test('every talk has the name of its file, speaks about blocks that exist, and names its controls', () => {
  expect(talks.length).toBeGreaterThanOrEqual(30);
  for (const { file, talk } of talks) {
    expect(`${talk.id}.json`).toBe(file);
    expect([file, unknown(talk.blocks), repeated(talk.blocks)]).toEqual([file, [], []]);
    expect([file, stringsIn(talk).filter((text) => vagueWords.test(text))]).toEqual([file, []]);
    expect([file, /^Picture /.test(talk.story)]).toEqual([file, true]);
  }
});
