import type { Figure } from './figure.ts';
import { braceAngle } from './braceAngle.ts';
import { crane } from './crane.ts';
import { dust } from './dust.ts';
import { fallClearance } from './fallClearance.ts';
import { heat } from './heat.ts';
import { holdDowns } from './holdDowns.ts';
import { incidentRate } from './incidentRate.ts';
import { ladder } from './ladder.ts';
import { lifting } from './lifting.ts';
import { loadShare } from './loadShare.ts';
import { noise } from './noise.ts';
import { powerLine } from './powerLine.ts';
import { readability } from './readability.ts';
import { riskBand } from './riskBand.ts';
import { sampleResult } from './sampleResult.ts';
import { sampleSize } from './sampleSize.ts';
import { samplingPlan } from './samplingPlan.ts';
import { sling } from './sling.ts';
import { surveySize } from './surveySize.ts';
import { swingFall } from './swingFall.ts';
import { teamLift } from './teamLift.ts';
import { vibration } from './vibration.ts';
import { wind } from './wind.ts';
import { workHeat } from './workHeat.ts';

/** Every working figure, in the order in which people look for them. */
export const figures: readonly Figure[] = [
  lifting,
  teamLift,
  noise,
  vibration,
  fallClearance,
  swingFall,
  ladder,
  braceAngle,
  holdDowns,
  wind,
  sling,
  loadShare,
  crane,
  heat,
  workHeat,
  dust,
  powerLine,
  incidentRate,
  sampleSize,
  surveySize,
  sampleResult,
  samplingPlan,
  riskBand,
  readability,
];

export const figureById = (id: string): Figure | null => figures.find((figure) => figure.id === id) ?? null;
