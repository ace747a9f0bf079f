import type { Matrix, Rating } from '../risk/matrix.ts';
import { bandOf, compareBands } from '../risk/matrix.ts';
import type { Profile } from '../profiles/profile.ts';
import type { Outline, OutlineHazard, OutlineStep } from './document/outline.ts';

/** Where a gap can be mended. */
export type GapPlace =
  { kind: 'titleBlock'; field: string } | { kind: 'node'; id: string } | { kind: 'document' };

/**
 * `law`: the profile's law requires it, and the clause says where. `rule`: the product's or organisation's own rule.
 * Both stop an issue. `advice` does not.
 */
export type GapSeverity = 'law' | 'rule' | 'advice';

export type Gap = {
  rule: string;
  severity: GapSeverity;
  place: GapPlace;
  words: string;
  clause: string | null;
};

export type ReadinessContext = { profile: Profile; matrix: Matrix };

/** What is missing or weak in a draft, each with its place. An issue is refused while `blocks(gap)` holds for one. */
export function gapsBeforeIssue(outline: Outline, context: ReadinessContext): Gap[] {
  return [
    ...particularGaps(outline, context.profile),
    ...stepGaps(outline),
    ...outline.steps.flatMap((step) =>
      step.hazards.flatMap((hazard) => hazardGaps(step, hazard, context.matrix)),
    ),
    ...fillInGaps(outline),
  ].map((gap) => withClause(gap, context.profile));
}

/** Whether a gap stops the issue. */
export const blocks = ({ severity }: Gap): boolean => severity !== 'advice';

type Draft = Omit<Gap, 'clause' | 'severity'> & { severity?: GapSeverity };

/** A rule that the profile's law requires carries its clause; any other is the product's own. */
function withClause(gap: Draft, profile: Profile): Gap {
  const required = profile.required.find(({ rule }) => rule === gap.rule);
  return { ...gap, severity: gap.severity ?? (required ? 'law' : 'rule'), clause: required?.clause ?? null };
}

const onTitleBlock = (field: string): GapPlace => ({ kind: 'titleBlock', field });
const at = (id: string): GapPlace => ({ kind: 'node', id });

function particularGaps({ particulars: written }: Outline, profile: Profile): Draft[] {
  // A letter that the profile does not know names no high risk work.
  const known = written.highRisk?.filter((key) => profile.highRisk.some((work) => work.key === key)) ?? [];
  const particulars = { ...written, highRisk: known };
  const gaps: Draft[] = [];
  const need = (field: keyof typeof particulars, words: string, severity?: GapSeverity) => {
    const value = particulars[field];
    const open = Array.isArray(value) ? value.length === 0 : (value ?? '').trim() === '';
    if (open)
      gaps.push({ rule: field, place: onTitleBlock(field), words, ...(severity ? { severity } : {}) });
  };
  need('job', 'Say what the job is.');
  need('highRisk', 'Tick the high risk work that this is.');
  need(
    'circumstances',
    'Say what about this site bears on the work: ground, access, slope, neighbours, services.',
  );
  need('responsible', 'Name who sees that the statement is followed.');
  need('implementation', 'Say how the controls will be put in place.');
  need('monitoring', 'Say how the controls will be watched.');
  need('review', 'Say when and how the controls will be reviewed.');
  need('emergency', 'Say what happens in an emergency: whom to call, the rescue, the way out.');
  need('workFrom', 'Give the day on which the work starts.', 'advice');
  need('reviewDate', 'Set a review date.', 'advice');
  need('consultation', 'Say who was consulted, and when.', 'advice');
  return gaps;
}

function stepGaps({ steps }: Outline): Draft[] {
  if (steps.length === 0)
    return [
      { rule: 'hazards', place: { kind: 'document' }, words: 'Add at least one step with its hazards.' },
    ];
  return steps.flatMap((step): Draft[] => {
    const gaps: Draft[] = [];
    if (step.title === '')
      gaps.push({ rule: 'stepTitle', place: at(step.id), words: `Step ${step.number} has no title.` });
    if (step.hazards.length === 0)
      gaps.push({ rule: 'hazards', place: at(step.id), words: `Step ${step.number} has no hazard.` });
    return gaps;
  });
}

function hazardGaps(step: OutlineStep, hazard: OutlineHazard, matrix: Matrix): Draft[] {
  const name = hazard.title || 'a hazard without a title';
  const gap = (rule: string, words: string, severity?: GapSeverity): Draft => ({
    rule,
    place: at(hazard.id),
    words: `Step ${step.number}, ${name}: ${words}`,
    ...(severity ? { severity } : {}),
  });
  const gaps: Draft[] = [];
  if (hazard.title === '') gaps.push(gap('hazardTitle', 'say what can hurt someone.'));
  if (!hazard.controls.some(({ text }) => text !== '')) gaps.push(gap('controls', 'there is no control.'));
  if (!hazard.initial || !hazard.residual)
    gaps.push(gap('rating', 'rate the risk before and after controls.'));
  else gaps.push(...ratingGaps(hazard.initial, hazard.residual, matrix, gap));
  for (const control of hazard.controls) {
    if (control.text !== '' && control.role === '')
      gaps.push({
        ...gap('controlRole', `say who sees to “${control.text.slice(0, 60)}”.`, 'advice'),
        place: at(control.id),
      });
  }
  return gaps;
}

function ratingGaps(
  initial: Rating,
  residual: Rating,
  matrix: Matrix,
  gap: (rule: string, words: string, severity?: GapSeverity) => Draft,
): Draft[] {
  const before = bandOf(matrix, initial);
  const after = bandOf(matrix, residual);
  if (!before || !after) return [gap('rating', 'the rating is not on the organisation’s matrix.')];
  if (compareBands(after, before) > 0)
    return [gap('residual', 'the risk after controls is higher than before.')];
  if (after === 'extreme')
    return [
      gap('residual', 'the risk is still extreme with the controls in place: stop and find better ones.'),
    ];
  if (after === before && before !== 'low')
    return [gap('residual', 'the controls do not bring the risk down a band.', 'advice')];
  return [];
}

function fillInGaps({ fillIns }: Outline): Draft[] {
  return fillIns
    .filter(({ value }) => value.trim() === '')
    .map(({ id, label, stepNumber }) => ({
      rule: 'fillIn',
      place: at(id),
      words: stepNumber === null ? `Fill in: ${label}.` : `Step ${stepNumber}, fill in: ${label}.`,
    }));
}
