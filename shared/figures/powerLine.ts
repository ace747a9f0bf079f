import { z } from 'zod';
import { defineFigure, refuseInput, verificationNames, verifications } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { powerLineTableFor, powerLineTables } from './power-line-tables.ts';
import { about, atLeast, listed } from './words.ts';

const known = powerLineTables.map(({ profiles }) => profiles[0]);

export const powerLine = defineFigure({
  id: 'powerLine',
  title: 'Distance from a power line',
  version: 1,
  summary: 'How far people, plant and loads keep off an overhead line, by the table of the place.',
  input: z.strictObject({
    profile: z
      .string({ error: 'Place must be the name of a profile.' })
      .trim()
      .toLowerCase()
      .regex(/^[a-z]{2}(-[a-z0-9]+)*$/, 'Place must be the name of a profile, such as au-sa or us.')
      .max(40, 'Place must be at most 40 characters.')
      .meta({ title: 'Place', description: `One of ${known.join(', ')}, or a place within one.` }),
    kilovolts: quantity('Line voltage', 'kV', {
      over: 0,
      most: 2000,
      help: 'Between phases. Not known: ask the line’s owner, and treat it as the highest.',
    }),
  }),
  output: z.strictObject({
    distanceM: outcome('Keep off', 'm'),
    rule: z.string().meta({ title: 'Rule' }),
    table: z.string().meta({ title: 'Table' }),
    verified: z.enum(verificationNames).meta({ title: 'How it was checked' }),
    warnings,
  }),
  formula:
    'Read from the table of the place. “Up to” takes the value in: 50 kV belongs to the row that ends at 50.',
  limits: [
    'Each table ends at a voltage; above it the line’s owner decides.',
    'Distances are to the nearest wire, from any part of a person, plant or load, with room for sag and swing.',
  ],
  caution:
    'Steel trusses and long sections carry current. Have the line switched off, moved or covered by its owner first; a distance is what is left. Tables differ by state, plant and training: confirm with the line’s owner.',
  sources: powerLineTables.map(({ name, source, verified }) => ({ title: name, locator: source, verified })),
  calculate: ({ profile, kilovolts }) => {
    const found = powerLineTableFor(profile);
    if (!found)
      throw refuseInput(
        'profile',
        `There is no table for ${profile}: ask the line’s owner. There are tables for ${listed(known)}.`,
      );
    const { table, own } = found;
    const index = table.rows.findIndex(({ upToKv }) => kilovolts <= upToKv);
    const row = table.rows[index];
    if (!row)
      throw refuseInput(
        'kilovolts',
        `Line voltage must be at most ${table.rows.at(-1)?.upToKv} kV for this table; above it, ${table.above}.`,
      );
    const from = table.rows[index - 1]?.upToKv;
    const reach = from === undefined ? `Up to ${row.upToKv} kV` : `Over ${from} to ${row.upToKv} kV`;
    return {
      distanceM: row.distanceM,
      rule: `${reach}: ${about(row.distanceM, 3)} m. ${table.source}.`,
      table: table.profiles[0],
      verified: table.verified,
      warnings: [
        ...(own ? [] : [`${profile} has no table of its own here; this is the one for ${table.name}.`]),
        ...(table.verified === 'law' || table.verified === 'regulator'
          ? []
          : [
              `This table is ${table.verified === 'memory' ? verifications.memory : 'read in a copy: confirm before relying on it'}.`,
            ]),
        ...table.notes,
      ],
    };
  },
  reading: ({ kilovolts }, { distanceM, verified }) =>
    `Keep every part of people, plant and load at least ${atLeast(distanceM)} m from this ${about(kilovolts, 3)} kV line.${
      verified === 'law' || verified === 'regulator' ? '' : ' Confirm the distance before relying on it.'
    }`,
  over: () => [],
});
