import { z } from 'zod';
import { ratingSchema } from '../risk/matrix.ts';

export const stages = [
  'setUp',
  'delivery',
  'wallFrames',
  'roofTrusses',
  'bracing',
  'cutting',
  'everyDay',
  'emergency',
] as const;
export type Stage = (typeof stages)[number];

export const stageNames: Record<Stage, string> = {
  setUp: 'Site set-up',
  delivery: 'Delivery and lifting',
  wallFrames: 'Wall frames',
  roofTrusses: 'Roof trusses',
  bracing: 'Bracing and battens',
  cutting: 'Cutting and fixing',
  everyDay: 'Every day',
  emergency: 'Emergency',
};

export const hazardCategories = [
  'fall',
  'fallThrough',
  'fallingObject',
  'collapse',
  'mobilePlant',
  'lifting',
  'traffic',
  'electricity',
  'cut',
  'eye',
  'noise',
  'vibration',
  'dust',
  'fire',
  'manualHandling',
  'slip',
  'weather',
  'heat',
  'chemical',
  'asbestos',
  'fatigue',
  'public',
  'other',
] as const;
export type HazardCategory = (typeof hazardCategories)[number];

export const hazardCategoryNames: Record<HazardCategory, string> = {
  fall: 'Fall from height',
  fallThrough: 'Fall through an opening or frame',
  fallingObject: 'Falling object',
  collapse: 'Collapse or toppling',
  mobilePlant: 'Mobile plant',
  lifting: 'Lifting and suspended load',
  traffic: 'Traffic',
  electricity: 'Electricity',
  cut: 'Cuts',
  eye: 'Eye injury',
  noise: 'Noise',
  vibration: 'Hand-arm vibration',
  dust: 'Dust',
  fire: 'Fire',
  manualHandling: 'Manual handling',
  slip: 'Slips and trips',
  weather: 'Wind and weather',
  heat: 'Heat and sun',
  chemical: 'Chemicals',
  asbestos: 'Asbestos',
  fatigue: 'Fatigue and fitness for work',
  public: 'Public and other trades',
  other: 'Other',
};

/**
 * Levels of the hierarchy of control. `tier` is the order of the model WHS Regulations reg 36: substitution, isolation and
 * engineering stand in the same tier.
 */
export const controlLevels = [
  'elimination',
  'substitution',
  'isolation',
  'engineering',
  'administrative',
  'ppe',
] as const;
export type ControlLevel = (typeof controlLevels)[number];

export const controlLevelNames: Record<ControlLevel, string> = {
  elimination: 'Elimination',
  substitution: 'Substitution',
  isolation: 'Isolation',
  engineering: 'Engineering',
  administrative: 'Administrative',
  ppe: 'Personal protective equipment',
};

export const controlTier: Record<ControlLevel, 1 | 2 | 3 | 4> = {
  elimination: 1,
  substitution: 2,
  isolation: 2,
  engineering: 2,
  administrative: 3,
  ppe: 4,
};

export const fillInKinds = ['text', 'number', 'date', 'person', 'choice'] as const;
export type FillInKind = (typeof fillInKinds)[number];

const key = z.string().regex(/^[a-z][a-zA-Z0-9]*$/, 'A key is letters and digits, starting small.');
const words = z.string().trim().min(1).max(600);
const lines = z.array(words);

export const checkQuestionSchema = z
  .strictObject({
    ask: words,
    answers: z.array(words).min(2).max(4),
    right: z.number().int().min(0),
    why: words,
  })
  .refine(({ answers, right }) => right < answers.length, 'The right answer is not among the answers.');
export type CheckQuestion = z.infer<typeof checkQuestionSchema>;

export const blockFillInSchema = z
  .strictObject({
    key,
    label: z.string().trim().min(1).max(80),
    kind: z.enum(fillInKinds),
    unit: z.string().max(20).optional(),
    choices: z.array(z.string().min(1)).min(2).optional(),
    help: words.optional(),
  })
  .refine(
    ({ kind, choices }) => (kind === 'choice') === (choices !== undefined),
    'Choices belong to a choice, and to nothing else.',
  );

const blockControl = z.strictObject({
  key,
  text: words,
  level: z.enum(controlLevels),
  /** Who sees to it: a role on site, never a name. */
  role: z.string().trim().min(1).max(60),
  /** How and how often it is checked. */
  check: z.string().trim().max(200).default(''),
});

const blockHazard = z.strictObject({
  key,
  title: z.string().trim().min(1).max(140),
  category: z.enum(hazardCategories),
  causes: words,
  consequences: words,
  initial: ratingSchema,
  residual: ratingSchema,
  controls: z.array(blockControl).min(1),
});

const blockStep = z.strictObject({
  key,
  title: z.string().trim().min(1).max(140),
  text: lines.default([]),
  /** What a worker reads on the step's crew card: plain words, reading grade of 8 or less. */
  card: words,
  hazards: z.array(blockHazard).min(1),
  stopIf: lines.default([]),
  holdPoints: z
    .array(z.strictObject({ key, text: words, releasedBy: z.string().trim().min(1).max(60) }))
    .default([]),
});

export const sourceSchema = z.strictObject({
  title: z.string().min(1),
  locator: z.string().default(''),
  /** How the fact was verified: the law or regulator's text seen, a secondary page seen, common practice, or from memory. */
  verified: z.enum(['law', 'regulator', 'secondary', 'practice', 'memory']),
});

/** A reusable hazard-and-control passage. In any words, `{{key}}` stands for the fill-in of that key. */
export const blockSchema = z
  .strictObject({
    format: z.literal(1),
    id: z.string().regex(/^[a-z0-9-]+$/),
    version: z.number().int().min(1),
    title: z.string().trim().min(1).max(100),
    summary: words,
    stage: z.enum(stages),
    tools: z.array(z.string().min(1)),
    /** Letters of the model high risk construction work list, reg 291. */
    highRisk: z.array(z.string().regex(/^[a-r]$/)),
    steps: z.array(blockStep).min(1),
    fillIns: z.array(blockFillInSchema).default([]),
    protective: lines.default([]),
    competencies: lines.default([]),
    equipment: lines.default([]),
    permits: lines.default([]),
    questions: z.array(checkQuestionSchema).min(2).max(4),
    talkPoints: lines.min(3),
    sources: z.array(sourceSchema).min(1),
    caution: words,
  })
  .superRefine((block, context) => {
    const known = new Set(block.fillIns.map((fillIn) => fillIn.key));
    const used = new Set(
      [...JSON.stringify(block.steps).matchAll(/\{\{(.*?)\}\}/g)].map((match) => match[1] ?? ''),
    );
    for (const name of used)
      if (!known.has(name)) context.addIssue(`The text names the fill-in "${name}", which is not defined.`);
    for (const name of known)
      if (!used.has(name)) context.addIssue(`The fill-in "${name}" is defined and never used.`);
  });
export type Block = z.infer<typeof blockSchema>;
export type BlockStep = Block['steps'][number];
