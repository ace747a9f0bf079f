import { z } from 'zod';
import { languages } from '../people/people.api.ts';
import { sourceSchema } from './block.ts';

/** What may stand in braces, in each kind of words. */
export const placeholders = {
  statement: ['title', 'revision'],
  talk: ['topic', 'date'],
  notice: ['organisation', 'contact'],
} as const;

const lines = (known: readonly string[]) =>
  z
    .array(
      z
        .string()
        .trim()
        .min(1)
        .max(600)
        .refine(
          (line) => namesIn(line).every((name) => known.includes(name)),
          `Only these may stand in braces: ${known.join(', ')}.`,
        ),
    )
    .min(1);

const signedWords = (known: readonly string[]) =>
  z.strictObject({
    id: z.string().regex(/^[a-z0-9-]+$/),
    version: z.number().int().min(1),
    words: lines(known),
  });

/** The words that people sign under a profile, and the notice shown before anything is collected from them. A change of words is a new version. */
export const declarationFileSchema = z.strictObject({
  format: z.literal(1),
  id: z.string().regex(/^[a-z0-9-]+$/),
  language: z.enum(languages),
  /** Signed with a statement. */
  statement: signedWords(placeholders.statement),
  /** Signed by those who were at a toolbox talk. */
  talk: signedWords(placeholders.talk),
  notice: z.strictObject({ version: z.number().int().min(1), paragraphs: lines(placeholders.notice) }),
  sources: z.array(sourceSchema).min(1),
});
export type DeclarationFile = z.infer<typeof declarationFileSchema>;

/** The lines with `{{name}}` replaced; a name that is not given throws, so that nobody signs words with a hole in them. */
export function fillWords(words: string[], values: Record<string, string>): string[] {
  return words.map((line) =>
    line.replaceAll(/\{\{(\w+)\}\}/g, (_whole, name: string) => {
      const value = values[name];
      if (value === undefined) throw new Error(`Nothing was given for “${name}”.`);
      return value;
    }),
  );
}

function namesIn(line: string): string[] {
  return [...line.matchAll(/\{\{(.*?)\}\}/g)].map((match) => match[1] ?? '');
}
