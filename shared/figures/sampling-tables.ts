/** Code letters and their sample sizes, smallest first (I and O are not used). */
export const sampleSizes = {
  A: 2,
  B: 3,
  C: 5,
  D: 8,
  E: 13,
  F: 20,
  G: 32,
  H: 50,
  J: 80,
  K: 125,
  L: 200,
  M: 315,
  N: 500,
  P: 800,
  Q: 1250,
  R: 2000,
} as const;
export type CodeLetter = keyof typeof sampleSizes;
export const codeLetters = Object.keys(sampleSizes) as CodeLetter[];

export const inspectionLevels = ['I', 'II', 'III'] as const;
export type InspectionLevel = (typeof inspectionLevels)[number];

/** Table 1: the letter for a lot up to this size, general levels I, II, III. */
export const lotRows: readonly ({ upTo: number } & Record<InspectionLevel, CodeLetter>)[] = [
  { upTo: 8, I: 'A', II: 'A', III: 'B' },
  { upTo: 15, I: 'A', II: 'B', III: 'C' },
  { upTo: 25, I: 'B', II: 'C', III: 'D' },
  { upTo: 50, I: 'C', II: 'D', III: 'E' },
  { upTo: 90, I: 'C', II: 'E', III: 'F' },
  { upTo: 150, I: 'D', II: 'F', III: 'G' },
  { upTo: 280, I: 'E', II: 'G', III: 'H' },
  { upTo: 500, I: 'F', II: 'H', III: 'J' },
  { upTo: 1200, I: 'G', II: 'J', III: 'K' },
  { upTo: 3200, I: 'H', II: 'K', III: 'L' },
  { upTo: 10_000, I: 'J', II: 'L', III: 'M' },
  { upTo: 35_000, I: 'K', II: 'M', III: 'N' },
  { upTo: 150_000, I: 'L', II: 'N', III: 'P' },
  { upTo: 500_000, I: 'M', II: 'P', III: 'Q' },
  { upTo: Infinity, I: 'N', II: 'Q', III: 'R' },
];

/** Acceptance quality limits in per cent, in the table’s order. */
export const aqls = [0.065, 0.1, 0.15, 0.25, 0.4, 0.65, 1, 1.5, 2.5, 4, 6.5, 10, 15, 25] as const;

/**
 * Table 2-A, single sampling, normal inspection. Letters and limits both grow by the same steps, so that each diagonal holds one
 * acceptance number: a row's first number is where accept 0 stands (A at 6.5), then come an arrow up and an arrow down, then these.
 */
export const acceptOnDiagonal = ['down', 0, 'up', 'down', 1, 2, 3, 5, 7, 10, 14, 21, 'up'] as const;

/** Where letter A’s 0 stands among the limits. */
export const firstZeroColumn = aqls.indexOf(6.5);
