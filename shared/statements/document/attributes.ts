import { z } from 'zod';
import {
  checkQuestionSchema,
  controlLevels,
  fillInKinds,
  hazardCategories,
  sourceSchema,
} from '../../library/block.ts';
import { idSchema } from '../../kernel/ids.ts';
import { workDate } from '../../kernel/work-date.ts';
import { ratingSchema } from '../../risk/matrix.ts';

const short = z.string().max(300);
const long = z.string().max(4000);

/** Where a passage came from: a library block, its version then, and the passage's key in it. */
export const originSchema = z.strictObject({
  block: z.string().max(80),
  version: z.number().int().min(1),
  passage: z.string().max(120),
});
export type Origin = z.infer<typeof originSchema>;

/** What a step needs beside its words; brought by blocks, edited with the step. */
export const needsSchema = z.strictObject({
  protective: z.array(short).max(40),
  competencies: z.array(short).max(40),
  equipment: z.array(short).max(40),
  permits: z.array(short).max(40),
});
export type Needs = z.infer<typeof needsSchema>;
export const noNeeds: Needs = { protective: [], competencies: [], equipment: [], permits: [] };

/**
 * The statement's particulars, on the title block. Model WHS Regulations reg 299(2) and (3) ask for the high risk work, how the
 * controls are implemented, monitored and reviewed, and the circumstances of the workplace.
 */
export const particularsSchema = z.strictObject({
  job: long,
  place: short,
  workFrom: workDate.nullable(),
  workTo: workDate.nullable(),
  highRisk: z.array(z.string().max(12)).max(40),
  circumstances: long,
  managementPlan: long,
  responsible: short,
  implementation: long,
  monitoring: long,
  review: long,
  reviewDate: workDate.nullable(),
  consultation: long,
  principalContractorCopy: workDate.nullable(),
  emergency: long,
});
export type Particulars = z.infer<typeof particularsSchema>;

export const noParticulars: Particulars = {
  job: '',
  place: '',
  workFrom: null,
  workTo: null,
  highRisk: [],
  circumstances: '',
  managementPlan: '',
  responsible: '',
  implementation: '',
  monitoring: '',
  review: '',
  reviewDate: null,
  consultation: '',
  principalContractorCopy: null,
  emergency: '',
};

export const stepAttributes = z.strictObject({
  id: idSchema,
  origin: originSchema.nullable(),
  /** Crew-card wording, where it differs from the step's own words. */
  card: z.string().max(600),
  needs: needsSchema,
  questions: z.array(checkQuestionSchema).max(12),
  sources: z.array(sourceSchema).max(30),
  caution: z.string().max(1000),
});

export const hazardAttributes = z.strictObject({
  id: idSchema,
  origin: originSchema.nullable(),
  category: z.enum(hazardCategories),
  /** Risk before and after controls, on the organisation's matrix; null until rated. */
  initial: ratingSchema.nullable(),
  residual: ratingSchema.nullable(),
});

export const controlAttributes = z.strictObject({
  id: idSchema,
  origin: originSchema.nullable(),
  level: z.enum(controlLevels),
  role: z.string().max(80),
  check: z.string().max(300),
});

export const stopIfAttributes = z.strictObject({ id: idSchema, origin: originSchema.nullable() });

export const holdPointAttributes = z.strictObject({
  id: idSchema,
  origin: originSchema.nullable(),
  releasedBy: z.string().max(80),
});

export const fillInAttributes = z.strictObject({
  id: idSchema,
  label: z.string().min(1).max(80),
  kind: z.enum(fillInKinds),
  unit: z.string().max(20),
  choices: z.array(z.string().max(120)).max(20),
  help: z.string().max(600),
  /** What stands in the hole; empty while it is open. */
  value: z.string().max(300),
});
export type FillIn = z.infer<typeof fillInAttributes>;

/** The attributes of every node that has some; a node that is not named here has none of its own. */
export const attributesOf = {
  titleBlock: particularsSchema,
  step: stepAttributes,
  hazard: hazardAttributes,
  control: controlAttributes,
  stopIf: stopIfAttributes,
  holdPoint: holdPointAttributes,
  fillIn: fillInAttributes,
  heading: z.strictObject({ level: z.number().int().min(1).max(3) }),
  orderedList: z.strictObject({
    start: z.number().int().min(1).max(999),
    type: z.string().max(3).nullable(),
  }),
} as const;
