import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { allExamples } from './figures-examples.ts';

/** Topics of other parts of the product, tested beside those. */
const elsewhere = ['diff', 'hash', 'merkle', 'JCS RFC 8785', 'dates'];

/** Examples that no figure works out, and why. */
const setAside: Record<string, string> = {
  'niosh-cli-three-task': 'several lifting tasks in one job; the figure takes one',
  'osha-nrr': 'noise reduction rating; the figure gives the AS/NZS class',
  'scaffold-duty': 'a scaffold’s duty is on its tag',
  'scaffold-light-check': 'as above',
  'bcsi-b2-1': 'timber truss restraint; the steel truss maker’s sheet governs',
  'bcsi-diagonal-interval': 'as above',
  'cwta-lateral-spacing': 'as above',
  'choke-angle': 'choke hitches are left to the sling’s tag',
  'metabolic-twa': 'the work rate is given as an hourly average',
  'acgih-caf': 'clothing is added by hand, as the figure says',
  'uv-index': 'no ultraviolet figure',
  'line-clearance-tree': 'tree work',
  'voltage-drop-bs': 'no voltage drop figure',
  'voltage-drop-limit': 'as above',
  'au-lead-lengths': 'no lead length figure; the table is unverified',
  'silica-osha-sample-percent': 'the mixture limit is superseded',
  'silica-osha-sample-pel': 'as above',
  'silica-osha-sample-exposure': 'the figure starts from a concentration',
  'silica-limits': 'the limit is an input, with its date',
  'brief-scala': 'a lowered limit is put in by hand, as the figure says',
  'fine-kinney': 'not a matrix of the product',
  'matrix-5x5': 'scores are not used; bands are',
  'nist-exact-4-20': 'the figure gives the Wilson interval, not the exact one',
  'hypergeom-marbles': 'the figure needs the chance of none only, tested with hypergeom-scipy',
  'smog-64': 'no SMOG score',
  'smog-aps': 'as above',
  'smog-squares': 'as above',
};

test('every published example is taken up by a test of a figure or set aside with a reason', () => {
  const folder = new URL('.', import.meta.url);
  const tests = readdirSync(folder)
    .filter((name) => /^figures-.*\.test\.ts$/.test(name) && name !== 'figures-taken-up.test.ts')
    .map((name) => readFileSync(new URL(name, folder), 'utf8'))
    .join('\n');
  const ours = allExamples.filter(({ topic }) => !elsewhere.includes(topic)).map(({ id }) => id);

  const missing = ours.filter((id) => !tests.includes(`'${id}'`) && !(id in setAside));
  const idle = Object.keys(setAside).filter(
    (id) => !ours.includes(id) || tests.includes(`published('${id}'`),
  );

  expect(missing).toEqual([]);
  expect(idle).toEqual([]);
});
