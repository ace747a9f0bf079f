import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { list, outcome, quantity, rowName, verdict, warnings } from './inputs.ts';
import { slip } from './numerics.ts';
import { about } from './words.ts';

export const dust = defineFigure({
  id: 'dust',
  title: 'Dust over the day',
  version: 1,
  summary: 'The day’s average dust in the air breathed, against a limit.',
  input: z.strictObject({
    tasks: list(
      'Tasks',
      z.strictObject({
        name: rowName,
        mgPerM3: quantity('Dust', 'mg/m³', { least: 0, most: 10_000 }),
        hours: quantity('Time', 'h', { over: 0, most: 24 }),
      }),
      1,
      30,
    ),
    limitMgPerM3: quantity('Limit over 8 hours', 'mg/m³', {
      least: 0.000001,
      most: 1000,
      help: 'The limit in force for this dust on the day of the work.',
    }),
  }),
  output: z.strictObject({
    twaMgPerM3: outcome('Average over 8 hours', 'mg/m³'),
    ratio: outcome('Average over limit'),
    within: verdict('Within the limit'),
    sampledHours: outcome('Time counted', 'h'),
    warnings,
  }),
  formula: 'Average = Σ concentration × hours / 8. Time without a measurement counts as 0.',
  limits: [
    'Up to 24 hours. Always divided by 8, so a longer shift counts in full.',
    'One substance. For several that act alike, add their ratios.',
    'Short peaks have limits of their own that an average hides.',
    'On shifts over 8 hours the limit itself is often lowered (by (8 / h)·(24 − h) / 16): put the lowered limit in.',
  ],
  caution:
    'Silica dust does its harm unseen. Under the limit still means wet cutting, extraction or staying out of it; give the limit that is in force, with its date.',
  sources: [
    { title: '29 CFR 1910.1000(d)(1)', locator: 'formula and worked example', verified: 'law' },
    {
      title: 'Respirable crystalline silica 0.05 mg/m³',
      locator: 'Safe Work Australia; name and figure under review from 1 December 2026',
      verified: 'memory',
    },
  ],
  calculate: ({ tasks, limitMgPerM3 }) => {
    const sampledHours = tasks.reduce((sum, { hours }) => sum + hours, 0);
    if (sampledHours > 24 + slip)
      throw refuseInput('tasks', 'Tasks must come to at most 24 h: a day has no more.');
    const twaMgPerM3 = tasks.reduce((sum, { mgPerM3, hours }) => sum + mgPerM3 * hours, 0) / 8;
    const short = 8 - sampledHours;
    return {
      twaMgPerM3,
      ratio: twaMgPerM3 / limitMgPerM3,
      within: twaMgPerM3 / limitMgPerM3 <= 1 + slip,
      sampledHours,
      warnings: [
        ...(short > slip ? [`${about(short, 2)} of 8 hours have no measurement and count as no dust.`] : []),
        ...(short < -slip
          ? ['The shift is over 8 hours: ask whether the limit must be lowered for it.']
          : []),
      ],
    };
  },
  reading: ({ limitMgPerM3 }, { twaMgPerM3, ratio, within, sampledHours }) =>
    `The day averages ${about(twaMgPerM3, 4)} mg/m³, ${about(ratio * 100, 0)} % of the limit of ${about(limitMgPerM3, 4)}: ${
      within ? 'within it' : 'over it. Wet or extract the dust, shorten the task, then choose the mask'
    }.${sampledHours < 8 - slip ? ' Time without a measurement counts as no dust.' : ''}`,
  over: ({ limitMgPerM3 }, { twaMgPerM3, within }) =>
    within
      ? []
      : [`Dust of ${about(twaMgPerM3, 4)} mg/m³ is over the limit of ${about(limitMgPerM3, 4)} mg/m³.`],
});
