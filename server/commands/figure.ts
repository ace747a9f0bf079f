import { z } from 'zod';
import { type Figure, verifications } from '#shared/figures/figure.ts';
import { figureById, figures } from '#shared/figures/registry.ts';
import { type Problem, Refusal, refusalStatus } from '#shared/kernel/refusal.ts';

/** What `--list` says of a figure; its schemas are JSON Schema. */
const described = ({
  input,
  output,
  id,
  title,
  version,
  summary,
  formula,
  limits,
  caution,
  sources,
}: Figure) => ({
  id,
  title,
  version,
  summary,
  formula,
  limits,
  caution,
  sources: sources.map((source) => ({ ...source, checked: verifications[source.verified] })),
  input: z.toJSONSchema(input, { io: 'input' }),
  output: z.toJSONSchema(output),
});

function parsed(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    throw new Refusal('invalid', 'The input is not JSON that can be read.');
  }
}

/** `npm run -s figure -- ID 'JSON'` or `npm run -s figure -- --list`. */
function answer([id, json, ...rest]: string[]): unknown {
  if (id === '--list' && json === undefined) return figures.map(described);
  if (id === undefined || json === undefined || rest.length > 0)
    throw new Refusal(
      'invalid',
      `Say which figure and its input as one piece of JSON: figure ID 'JSON', or figure --list.`,
    );
  const figure = figureById(id);
  if (!figure)
    throw new Refusal(
      'missing',
      `There is no figure “${id}”. There are ${figures.map((each) => each.id).join(', ')}.`,
    );
  return figure.compute(parsed(json));
}

function problemOf({ code, message, fields }: Refusal): Problem {
  return {
    type: 'about:blank',
    title: code === 'missing' ? 'Not found' : 'This does not fit',
    status: refusalStatus[code],
    detail: message,
    code,
    ...(Object.keys(fields).length > 0 ? { fields } : {}),
  };
}

// Whoever reads may stop early: `figure --list | head`.
process.stdout.on('error', () => process.exit(0));

try {
  console.log(JSON.stringify(answer(process.argv.slice(2)), null, 2));
} catch (error) {
  if (!(error instanceof Refusal)) throw error;
  console.error(JSON.stringify(problemOf(error), null, 2));
  process.exitCode = 2;
}
