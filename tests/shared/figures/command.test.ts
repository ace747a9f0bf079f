import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { figures } from '#shared/figures/registry.ts';

const root = fileURLToPath(new URL('../../..', import.meta.url));

function run(...words: string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', 'server/commands/figure.ts', ...words],
    {
      cwd: root,
      encoding: 'utf8',
      maxBuffer: 16 * 1024 * 1024,
    },
  );
  return { status, stdout, stderr };
}

describe('npm run figure', () => {
  test('prints the result of a figure as JSON and exits 0', () => {
    const { status, stdout, stderr } = run('sling', '{"loadKg":1000,"legs":2,"angleBetweenLegsDeg":120}');

    expect([status, stderr]).toEqual([0, '']);
    expect(JSON.parse(stdout)).toMatchObject({ legsCounted: 2 });
    expect((JSON.parse(stdout) as { legTensionKg: number }).legTensionKg).toBeCloseTo(1000, 9);
  });

  test.each([
    ['an unknown figure', ['nonesuch', '{}'], 'missing', 'There is no figure'],
    ['text that is not JSON', ['sling', '{loadKg:1}'], 'invalid', 'not JSON'],
    [
      'input over a limit',
      ['sling', '{"loadKg":1000,"legs":2,"angleBetweenLegsDeg":130}'],
      'invalid',
      'at most 120 °',
    ],
    ['no input', ['sling'], 'invalid', 'one piece of JSON'],
    ['nothing at all', [], 'invalid', 'one piece of JSON'],
    ['a second piece of JSON', ['sling', '{}', '{}'], 'invalid', 'one piece of JSON'],
  ])('prints a problem for %s on standard error only and exits 2', (_, words, code, detail) => {
    const { status, stdout, stderr } = run(...words);

    expect([status, stdout]).toEqual([2, '']);
    const problem = JSON.parse(stderr) as { code: string; detail: string; status: number };
    expect(problem.code).toBe(code);
    expect(problem.detail).toContain(detail);
    expect(problem.status).toBe(code === 'missing' ? 404 : 400);
  });

  test('names the fields that do not fit', () => {
    const { stderr } = run('lifting', '{"horizontalCm":70}');
    const { fields } = JSON.parse(stderr) as { fields: Record<string, string> };
    expect(fields.horizontalCm).toContain('at most 63 cm');
    expect(fields.loadKg).toContain('missing');
  });

  test('lists every figure with its schemas, formula and sources', () => {
    const { status, stdout } = run('--list');

    expect(status).toBe(0);
    const listed = JSON.parse(stdout) as {
      id: string;
      input: { type: string };
      output: { type: string };
      sources: { checked: string }[];
    }[];
    expect(listed.map(({ id }) => id)).toEqual(figures.map(({ id }) => id));
    for (const { input, output, sources } of listed) {
      expect([input.type, output.type]).toEqual(['object', 'object']);
      for (const { checked } of sources) expect(checked).toBeTruthy();
    }
  });
});
