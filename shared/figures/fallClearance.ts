import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { slip } from './numerics.ts';
import { about, atLeast } from './words.ts';

const metres = (label: string, help: string) => quantity(label, 'm', { least: 0, most: 15, help });

const freeFallLimits = [
  { metres: 2.0, where: 'Australia' },
  { metres: 1.8, where: 'the United States (6 ft)' },
] as const;

export const fallClearance = defineFigure({
  id: 'fallClearance',
  title: 'Room to fall',
  version: 1,
  summary: 'How much clear room a fall-arrest lanyard needs below the anchor and below the feet.',
  input: z.strictObject({
    lanyardM: metres('Lanyard', 'Its length with hooks, as the label says.'),
    tearOutM: metres('Absorber tear-out', 'The longest, as the label says.'),
    harnessStretchM: metres('Harness stretch and slide', 'As the maker says.'),
    attachmentHeightM: metres('Feet to the attachment on the harness', 'Measured on the person.'),
    marginM: metres('Margin', 'Clear room left below the feet.'),
    anchorAboveAttachmentM: quantity('Anchor above the attachment', 'm', {
      least: -15,
      most: 15,
      help: 'Standing and clipped on. Negative when the anchor is lower.',
    }).default(0),
  }),
  output: z.strictObject({
    freeFallM: outcome('Free fall', 'm'),
    requiredBelowAnchorM: outcome('Clear room below the anchor', 'm'),
    requiredBelowFeetM: outcome('Clear room below the feet', 'm'),
    warnings,
  }),
  formula:
    'Below the anchor = lanyard + tear-out + harness stretch + feet to attachment + margin. Free fall = lanyard − anchor above attachment, never less than 0. Below the feet = below the anchor − anchor above attachment − feet to attachment.',
  limits: [
    'Each term 0 to 15 m and yours to give: makers and guides differ, so there is no built-in total.',
    'For one lanyard with an absorber straight above the fall. Horizontal lines sag and add room; a fall to the side swings (see the swing fall).',
  ],
  caution:
    'A harness is the last resort, needs a rescue that works within minutes, and is never clipped to a single or unbraced truss. The maker’s own clearance figure comes first.',
  sources: [
    {
      title: 'Sum of the terms',
      locator: 'the same in a UK manual, makers’ manuals and training pages',
      verified: 'secondary',
    },
    {
      title: 'Free fall of 2.0 m, AS/NZS 1891.4',
      locator: 'quoted on suppliers’ pages',
      verified: 'secondary',
    },
    {
      title: '29 CFR 1926.502(d)(16)',
      locator: 'free fall of 6 ft, as adopted in WAC 296-880-40020',
      verified: 'law',
    },
  ],
  calculate: ({
    lanyardM,
    tearOutM,
    harnessStretchM,
    attachmentHeightM,
    marginM,
    anchorAboveAttachmentM,
  }) => {
    const freeFallM = Math.max(0, lanyardM - anchorAboveAttachmentM);
    const requiredBelowAnchorM = lanyardM + tearOutM + harnessStretchM + attachmentHeightM + marginM;
    const requiredBelowFeetM = lanyardM + tearOutM + harnessStretchM + marginM - anchorAboveAttachmentM;
    if (requiredBelowFeetM < 0)
      throw refuseInput(
        'anchorAboveAttachmentM',
        'Anchor above the attachment must be within reach of the lanyard: this one could not be clipped on.',
      );
    return {
      freeFallM,
      requiredBelowAnchorM,
      requiredBelowFeetM,
      warnings: [
        ...freeFallLimits
          .filter(({ metres: limit }) => freeFallM > limit + slip)
          .map(({ metres: limit, where }) => `The free fall is over ${limit} m, the most in ${where}.`),
        ...(Math.abs(anchorAboveAttachmentM) > lanyardM + slip
          ? ['The lanyard does not reach from the anchor to the harness as given: check the lengths.']
          : []),
        ...(anchorAboveAttachmentM < 0 ? ['The anchor is below the harness: clip on higher.'] : []),
      ],
    };
  },
  reading: (_, { freeFallM, requiredBelowAnchorM, requiredBelowFeetM }) =>
    `There must be ${atLeast(requiredBelowAnchorM, 2)} m clear below the anchor, ${atLeast(requiredBelowFeetM, 2)} m below the feet; with less, a fall ends on what is below. The free fall is ${about(freeFallM, 2)} m.`,
  over: (_, { freeFallM }) =>
    freeFallM > 2.0 + slip ? [`A free fall of ${about(freeFallM, 2)} m is over 2.0 m.`] : [],
});
