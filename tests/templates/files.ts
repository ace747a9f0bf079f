import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const folder = (name: string) => fileURLToPath(new URL(`../../templates/${name}/`, import.meta.url));

/** Every JSON file of a template folder, unparsed by any schema. */
export function filesOf(name: string): { file: string; json: unknown }[] {
  return readdirSync(folder(name))
    .filter((file) => file.endsWith('.json'))
    .sort()
    .map((file) => ({ file, json: JSON.parse(readFileSync(folder(name) + file, 'utf8')) as unknown }));
}

/** Words that leave the control to whoever reads them: the first eight after law.md 1.41 (WorkSafe ACT guidance; list is ours), the rest our own. */
export const vagueWords =
  /\b(appropriate(ly)?|as required|as necessary|if possible|where practicable|adequate(ly)?|take care|be careful|as needed|as applicable|where possible|where (required|necessary)|when (required|necessary)|if (required|necessary)|suitabl[ey]|sufficient(ly)?|properly|good condition)\b/i;

/** Every string in a JSON value. */
export function stringsIn(value: unknown): string[] {
  if (typeof value === 'string') return [value];
  if (Array.isArray(value)) return value.flatMap(stringsIn);
  if (value !== null && typeof value === 'object') return Object.values(value).flatMap(stringsIn);
  return [];
}
