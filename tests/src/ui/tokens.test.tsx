import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';

/** Contrast after WCAG 2.2, 1.4.3 and 1.4.11: relative luminance as defined there. */
function contrast(a: string, b: string): number {
  const [light, dark] = [luminance(a), luminance(b)].sort((x, y) => y - x) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}

function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

const css = readFileSync('src/index.css', 'utf8');
const read = (part: string) =>
  Object.fromEntries(
    [...part.matchAll(/--color-([a-z-]+): (#[0-9a-f]{6});/g)].map(([, name, value]) => [name, value]),
  );
const light = read(css.slice(css.indexOf('@theme'), css.indexOf('@layer base')));
const dark = {
  ...light,
  ...read(css.slice(css.indexOf('prefers-color-scheme: dark'), css.indexOf('html {'))),
};

test('the formula gives the published bounds: black on white 21, equal colours 1', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  expect(contrast('#7c878c', '#7c878c')).toBe(1);
});

describe.each([
  ['light', light],
  ['dark', dark],
])('in the %s scheme', (_name, tokens: Record<string, string | undefined>) => {
  const of = (name: string) => tokens[name] ?? '';
  const surfaces = ['paper', 'sheet', 'chalk-wash'];

  test.each(
    surfaces.flatMap((surface) =>
      ['ink', 'ink-soft', 'chalk', 'line', 'oxide', 'lichen'].map((text) => [text, surface] as const),
    ),
  )('%s on %s reads as text (4.5:1)', (text, surface) => {
    expect(contrast(of(text), of(surface))).toBeGreaterThanOrEqual(4.5);
  });

  test.each([
    ['on-chalk', 'chalk'],
    ['on-line', 'line'],
  ])('%s on %s reads as text (4.5:1)', (text, surface) => {
    expect(contrast(of(text), of(surface))).toBeGreaterThanOrEqual(4.5);
  });

  test.each(['paper', 'sheet'])('the edge of a control stands out on %s (3:1)', (surface) => {
    expect(contrast(of('edge'), of(surface))).toBeGreaterThanOrEqual(3);
  });
});

test.each([
  ['low', '#efe8d8', '#1a2226'],
  ['moderate', '#e3c68d', '#1a2226'],
  ['high', '#c9763a', '#1a2226'],
  ['extreme', '#7a1f12', '#ffffff'],
])('the word of the %s band reads on its colour (4.5:1)', (name, background, text) => {
  expect(css).toContain(background);
  expect(light[name]).toBe(background);
  expect(contrast(background, text)).toBeGreaterThanOrEqual(4.5);
});
