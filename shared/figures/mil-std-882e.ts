/** Bands of MIL-STD-882E Table III, least first. Its words are not those of the organisation's own matrices. */
export const milBands = ['eliminated', 'low', 'medium', 'serious', 'high'] as const;
export type MilBand = (typeof milBands)[number];

/** Rows by probability, columns by severity 1 (catastrophic) to 4 (negligible): the worst comes first. */
export const milStd882e: {
  id: 'mil-std-882e';
  cells: Record<string, readonly [MilBand, MilBand, MilBand, MilBand]>;
} = {
  id: 'mil-std-882e',
  cells: {
    A: ['high', 'high', 'serious', 'medium'],
    B: ['high', 'high', 'serious', 'medium'],
    C: ['high', 'serious', 'medium', 'low'],
    D: ['serious', 'medium', 'medium', 'low'],
    E: ['medium', 'medium', 'medium', 'low'],
    F: ['eliminated', 'eliminated', 'eliminated', 'eliminated'],
  },
};
