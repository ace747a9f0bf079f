import { controlLevelNames, controlTier, type ControlLevel } from '../library/block.ts';
import { bandNames, bandOf, type Matrix, type Rating } from '../risk/matrix.ts';
import type { NodeJson } from '../statements/document/json.ts';
import { childrenOf, Inline, Prose, proseTypes } from './Prose.tsx';

type Numbered = { node: NodeJson; number: number };

/** Steps as the table of the sheet: hazard and risk before, controls by level, risk after. The heading repeats on every page. */
export function StepsTable({ steps, matrix }: { steps: Numbered[]; matrix: Matrix }) {
  return (
    <table className="steps">
      <thead>
        <tr>
          <th scope="col">Hazard</th>
          <th scope="col">Before</th>
          <th scope="col">Controls, highest level first; who, and how it is checked</th>
          <th scope="col">After</th>
        </tr>
      </thead>
      {steps.map(({ node, number }) => (
        <StepRows key={node.attrs?.id as string} node={node} number={number} matrix={matrix} />
      ))}
    </table>
  );
}

function StepRows({ node, number, matrix }: Numbered & { matrix: Matrix }) {
  const prose = childrenOf(node, ...proseTypes);
  const after = childrenOf(node, 'holdPoint', 'stopIf');
  return (
    <tbody>
      <tr className="step">
        <th scope="rowgroup" colSpan={4}>
          <span className="number">Step {number}</span> <Inline node={childrenOf(node, 'stepTitle')[0]} />
          {prose.map((child, index) => (
            <Prose key={index} node={child} />
          ))}
        </th>
      </tr>
      {childrenOf(node, 'hazard').map((hazard) => (
        <HazardRow key={hazard.attrs?.id as string} node={hazard} matrix={matrix} />
      ))}
      {after.map((line) => (
        <tr key={line.attrs?.id as string} className={line.type}>
          <td colSpan={4}>
            <strong>{line.type === 'holdPoint' ? 'Hold point' : 'Stop if'}</strong> <Inline node={line} />
            {line.attrs?.releasedBy ? (
              <span className="who"> Released by: {line.attrs.releasedBy as string}.</span>
            ) : null}
          </td>
        </tr>
      ))}
    </tbody>
  );
}

function HazardRow({ node, matrix }: { node: NodeJson; matrix: Matrix }) {
  const controls = childrenOf(node, 'control').toSorted(
    (a, b) => controlTier[levelOf(a)] - controlTier[levelOf(b)],
  );
  return (
    <tr className="hazard">
      <td>
        <strong>
          <Inline node={childrenOf(node, 'hazardTitle')[0]} />
        </strong>
        {childrenOf(node, ...proseTypes).map((child, index) => (
          <Prose key={index} node={child} />
        ))}
      </td>
      <td>
        <RatingCell rating={node.attrs?.initial as Rating | null} matrix={matrix} />
      </td>
      <td>
        <ul className="controls">
          {controls.map((control) => (
            <li key={control.attrs?.id as string}>
              <span className="level">{controlLevelNames[levelOf(control)]}</span> <Inline node={control} />
              <span className="who">{whoAndCheck(control)}</span>
            </li>
          ))}
        </ul>
      </td>
      <td>
        <RatingCell rating={node.attrs?.residual as Rating | null} matrix={matrix} />
      </td>
    </tr>
  );
}

const levelOf = (control: NodeJson) => control.attrs?.level as ControlLevel;

function whoAndCheck({ attrs }: NodeJson): string {
  const { role, check } = attrs as { role: string; check: string };
  return [role, check].filter(Boolean).join('; ');
}

/** Band in words with its pattern, and the likelihood and consequence behind it. */
function RatingCell({ rating, matrix }: { rating: Rating | null; matrix: Matrix }) {
  const band = rating && bandOf(matrix, rating);
  if (!rating || !band) return <span className="hole">[not rated]</span>;
  return (
    <span className={`band ${band}`}>
      {bandNames[band]}
      <small>
        {rating.likelihood}
        {rating.consequence}
      </small>
    </span>
  );
}
