import { readdirSync, readFileSync, existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { z } from 'zod';
import { type Block, blockSchema } from '#shared/library/block.ts';
import { declarationFileSchema } from '#shared/library/declaration.ts';
import { starterSchema } from '#shared/library/starter.ts';
import { type Profile, profileSchema } from '#shared/profiles/profile.ts';
import { type Matrix, matrixSchema } from '#shared/risk/matrix.ts';

/** The folder of package.json, from the sources and from the bundle alike. */
export const projectRoot = (() => {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json'))) folder = dirname(folder);
  return folder;
})();

function readAll<T extends z.ZodType>(folder: string, schema: T): z.output<T>[] {
  const path = join(projectRoot, 'templates', folder);
  return readdirSync(path)
    .filter((name) => name.endsWith('.json'))
    .sort()
    .map((name) => {
      const read = schema.safeParse(JSON.parse(readFileSync(join(path, name), 'utf8')));
      if (!read.success)
        throw new Error(`templates/${folder}/${name} does not fit its schema: ${read.error.message}`);
      return read.data;
    });
}

const once = <T>(read: () => T): (() => T) => {
  let value: T | undefined;
  return () => (value ??= read());
};

export const blockTemplates = once((): Block[] => readAll('blocks', blockSchema));
export const starters = once(() => readAll('starters', starterSchema));
export const declarations = once(() => readAll('declarations', declarationFileSchema));
export const matrices = once((): Matrix[] => readAll('matrices', matrixSchema));
const profiles = once((): Profile[] => readAll('profiles', profileSchema));

/** Reads all of them, so that one that does not fit stops the start and not the person who comes upon it. */
export function checkTemplates(): void {
  for (const read of [blockTemplates, starters, declarations, matrices, profiles]) read();
}

export function profileOf(id: string): Profile {
  const profile = profiles().find((candidate) => candidate.id === id);
  if (!profile) throw new Error(`There is no profile "${id}".`);
  return profile;
}
