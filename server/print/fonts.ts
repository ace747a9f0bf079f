import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';

const require = createRequire(import.meta.url);

type Face = { css: string; file: string; ranges: [number, number][] };

let faces: Promise<Face[]> | undefined;

/**
 * Noto Sans as inlined faces, only the subsets that the text needs. The static files: Chromium embeds the variable one as Type 3.
 */
export async function fontCssFor(text: string): Promise<string> {
  faces ??= readFaces();
  const points = new Set([...text].map((character) => character.codePointAt(0) ?? 0));
  const needed = (await faces).filter(({ ranges }) =>
    ranges.some(([from, to]) => [...points].some((point) => point >= from && point <= to)),
  );
  const inlined = await Promise.all(
    needed.map(async ({ css, file }) => {
      const font = await readFile(file);
      return css.replace(
        /src:[^;]*;/,
        `src: url(data:font/woff2;base64,${font.toString('base64')}) format('woff2');`,
      );
    }),
  );
  return inlined.join('\n');
}

async function readFaces(): Promise<Face[]> {
  const folder = dirname(require.resolve('@fontsource/noto-sans/package.json'));
  const sheets = await Promise.all(
    ['400.css', '700.css', '400-italic.css'].map((name) => readFile(join(folder, name), 'utf8')),
  );
  return (
    sheets
      .join('\n')
      .match(/@font-face\s*{[^}]*}/g)
      ?.map((css) => ({
        css,
        file: join(folder, /url\(\.\/(files\/[^)]*\.woff2)\)/.exec(css)?.[1] ?? ''),
        ranges: rangesOf(/unicode-range:\s*([^;]*);/.exec(css)?.[1] ?? 'U+0-10FFFF'),
      })) ?? []
  );
}

function rangesOf(text: string): [number, number][] {
  return text.split(',').map((part) => {
    const [from = '0', to = from] = part.trim().replace(/^U\+/i, '').split('-');
    return [Number.parseInt(from.replaceAll('?', '0'), 16), Number.parseInt(to.replaceAll('?', 'F'), 16)];
  });
}
