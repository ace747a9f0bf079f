/** Frequency multipliers of the revised NIOSH equation (Table 5): lifts a minute, then hands below 75 cm | at 75 cm and above. */
export const frequencyRows = [
  { lifts: 0.2, oneHour: [1.0, 1.0], twoHours: [0.95, 0.95], eightHours: [0.85, 0.85] },
  { lifts: 0.5, oneHour: [0.97, 0.97], twoHours: [0.92, 0.92], eightHours: [0.81, 0.81] },
  { lifts: 1, oneHour: [0.94, 0.94], twoHours: [0.88, 0.88], eightHours: [0.75, 0.75] },
  { lifts: 2, oneHour: [0.91, 0.91], twoHours: [0.84, 0.84], eightHours: [0.65, 0.65] },
  { lifts: 3, oneHour: [0.88, 0.88], twoHours: [0.79, 0.79], eightHours: [0.55, 0.55] },
  { lifts: 4, oneHour: [0.84, 0.84], twoHours: [0.72, 0.72], eightHours: [0.45, 0.45] },
  { lifts: 5, oneHour: [0.8, 0.8], twoHours: [0.6, 0.6], eightHours: [0.35, 0.35] },
  { lifts: 6, oneHour: [0.75, 0.75], twoHours: [0.5, 0.5], eightHours: [0.27, 0.27] },
  { lifts: 7, oneHour: [0.7, 0.7], twoHours: [0.42, 0.42], eightHours: [0.22, 0.22] },
  { lifts: 8, oneHour: [0.6, 0.6], twoHours: [0.35, 0.35], eightHours: [0.18, 0.18] },
  { lifts: 9, oneHour: [0.52, 0.52], twoHours: [0.3, 0.3], eightHours: [0, 0.15] },
  { lifts: 10, oneHour: [0.45, 0.45], twoHours: [0.26, 0.26], eightHours: [0, 0.13] },
  { lifts: 11, oneHour: [0.41, 0.41], twoHours: [0, 0.23], eightHours: [0, 0] },
  { lifts: 12, oneHour: [0.37, 0.37], twoHours: [0, 0.21], eightHours: [0, 0] },
  { lifts: 13, oneHour: [0, 0.34], twoHours: [0, 0], eightHours: [0, 0] },
  { lifts: 14, oneHour: [0, 0.31], twoHours: [0, 0], eightHours: [0, 0] },
  { lifts: 15, oneHour: [0, 0.28], twoHours: [0, 0], eightHours: [0, 0] },
] as const;

export const gripNames = ['good', 'fair', 'poor'] as const;
export type Grip = (typeof gripNames)[number];

/** Coupling multipliers (Table 7): hands below 75 cm | at 75 cm and above. */
export const gripFactors: Record<Grip, readonly [number, number]> = {
  good: [1.0, 1.0],
  fair: [0.95, 1.0],
  poor: [0.9, 0.9],
};

/** What the equation does not cover; shown on every result. */
export const leftOut = [
  'Lifting with one hand, or by two people together.',
  'Lifting while sitting or kneeling, or where there is no room to stand and move freely.',
  'A load that shifts or swings, or that is very hot, cold or dirty.',
  'Carrying, pushing, pulling, shovelling, wheelbarrows, and fast lifts.',
  'Heat and cold: the equation holds at 19 to 26 °C and 35 to 50 % humidity, so not on a hot roof.',
  'Slippery or uneven ground: the feet need a grip like that of a clean, dry floor.',
  'More than 8 hours, or too little rest: up to 1 hour needs as long again of light work after it, up to 2 hours needs a third as long.',
] as const;
