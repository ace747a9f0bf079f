import { formatDay, formatInstant } from '../kernel/work-date.ts';
import { shortHash } from '../kernel/canonical.ts';
import { bandNames, bands } from '../risk/matrix.ts';
import type { NodeJson } from '../statements/document/json.ts';
import type { Frozen } from '../statements/frozen.ts';
import type { Sheet } from '../statements/statements.api.ts';
import { Prose } from './Prose.tsx';
import { SheetMark } from './SheetMark.tsx';
import { SignOnTable } from './SignOnTable.tsx';
import { StepsTable } from './StepsTable.tsx';

/** The printed statement: pure, so that the server's PDF and the browser's own print come from here and nowhere else. */
export function StatementSheet({ sheet }: { sheet: Sheet }) {
  const { frozen } = sheet;
  return (
    <article className="sheet" lang="en">
      <Stamp sheet={sheet} />
      <TitleBlock sheet={sheet} />
      <Particulars frozen={frozen} />
      <h2>How the work is done</h2>
      <Body frozen={frozen} />
      <Needs frozen={frozen} />
      <Emergency frozen={frozen} />
      <Matrix frozen={frozen} />
      <Sources frozen={frozen} />
      <p className="fine caution">{frozen.profile.caution}</p>
      <h2>Sign-on</h2>
      <p className="fine">{frozen.profile.signing}</p>
      <SignOnTable signatures={sheet.signatures} timeZone={frozen.site.timeZone} />
    </article>
  );
}

/** What stands across every page of a copy that must not be worked from. */
export function stampOf({ revision }: Pick<Sheet, 'revision'>): string | null {
  if (!revision) return 'Draft: not for use';
  if (revision.standing === 'superseded') return 'Superseded';
  if (revision.standing === 'withdrawn') return 'Withdrawn';
  return null;
}

function Stamp({ sheet }: { sheet: Sheet }) {
  const words = stampOf(sheet);
  return words ? <p className="stamp">{words}</p> : null;
}

/** How a statement is numbered on paper: the end of its id, which is unique enough to file by. */
export const sheetNumber = ({ statementId }: Pick<Frozen, 'statementId'>) => statementId.slice(-8);

function TitleBlock({ sheet }: { sheet: Sheet }) {
  const { frozen, revision, verifyQrSvg, verifyAddress } = sheet;
  const { site, outline } = frozen;
  const zone = site.timeZone;
  const cells: [string, string][] = [
    ['Site', `${site.name}, ${site.address}`],
    ['Number', sheetNumber(frozen)],
    ['Revision', revision ? String(revision.number) : 'Draft'],
    ['Principal contractor', site.principalContractor || '—'],
    ['Prepared by', frozen.preparedBy],
    [
      'Checked and issued by',
      revision ? `${revision.issuedBy}, ${formatInstant(revision.issuedAt, zone)}` : 'Not issued',
    ],
    ['Work', workDays(outline.particulars)],
    ['Review', outline.particulars.reviewDate ? formatDay(outline.particulars.reviewDate) : '—'],
  ];
  return (
    <header className="title-block">
      <div className="who-for">
        <SheetMark />
        <span>{frozen.organisation}</span>
        {frozen.invented ? <span className="invented">Invented demo data</span> : null}
      </div>
      <h1>{frozen.title}</h1>
      <p className="kind">{frozen.profile.documentTitle}</p>
      <dl>
        {cells.map(([term, words]) => (
          <div key={term}>
            <dt>{term}</dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
      {revision && verifyQrSvg ? (
        <div className="verify">
          <img alt={`QR code: is this copy current? ${verifyAddress ?? ''}`} src={svgAddress(verifyQrSvg)} />
          <span>Is this copy current? {shortHash(revision.hash)}</span>
        </div>
      ) : null}
    </header>
  );
}

/** An SVG as an image address: what comes from elsewhere can draw, and do nothing else. */
export const svgAddress = (svg: string): string => `data:image/svg+xml;utf8,${encodeURIComponent(svg)}`;

function workDays({ workFrom, workTo }: Frozen['outline']['particulars']): string {
  if (!workFrom) return '—';
  return workTo && workTo !== workFrom
    ? `${formatDay(workFrom)} to ${formatDay(workTo)}`
    : formatDay(workFrom);
}

function Particulars({ frozen }: { frozen: Frozen }) {
  const { particulars } = frozen.outline;
  const ticked = frozen.profile.highRisk.filter(({ key }) => particulars.highRisk.includes(key));
  const rows: [string, string][] = [
    ['The job', particulars.job],
    ['Where on the site', particulars.place],
    ['Circumstances of the site', particulars.circumstances],
    ['Site safety plan taken into account', particulars.managementPlan],
    ['Who sees that it is followed', particulars.responsible],
    ['How controls are put in place', particulars.implementation],
    ['How controls are watched', particulars.monitoring],
    ['How controls are reviewed', particulars.review],
    ['Who was consulted', particulars.consultation],
    [
      'Copy to the principal contractor',
      particulars.principalContractorCopy ? formatDay(particulars.principalContractorCopy) : '',
    ],
    ['What changed in this revision', frozen.changeNote],
  ];
  return (
    <section className="particulars">
      <h2>{frozen.profile.highRiskTerm}</h2>
      <ul className="high-risk">
        {ticked.map(({ key, words, clause }) => (
          <li key={key}>
            {words} <span className="clause">{clause}</span>
          </li>
        ))}
      </ul>
      <h2>Particulars</h2>
      <dl className="rows">
        {rows
          .filter(([, words]) => words.trim() !== '')
          .map(([term, words]) => (
            <div key={term}>
              <dt>{term}</dt>
              <dd>{words}</dd>
            </div>
          ))}
      </dl>
    </section>
  );
}

/** The document in its own order: prose where it stands, neighbouring steps in one table. */
function Body({ frozen }: { frozen: Frozen }) {
  return (
    <>
      {runsOf(frozen.document).map((run, index) =>
        run.steps.length > 0 ? (
          <StepsTable key={index} steps={run.steps} matrix={frozen.matrix} />
        ) : (
          run.prose.map((node, at) => <Prose key={`${index}-${at}`} node={node} />)
        ),
      )}
    </>
  );
}

type Run = { steps: { node: NodeJson; number: number }[]; prose: NodeJson[] };

function runsOf(document: NodeJson): Run[] {
  const runs: Run[] = [];
  let number = 0;
  for (const node of document.content ?? []) {
    if (node.type === 'titleBlock') continue;
    const isStep = node.type === 'step';
    let run = runs.at(-1);
    if (!run || run.steps.length > 0 !== isStep) runs.push((run = { steps: [], prose: [] }));
    if (isStep) run.steps.push({ node, number: (number += 1) });
    else run.prose.push(node);
  }
  return runs;
}

const unique = (texts: string[]) => [...new Set(texts)];

function Needs({ frozen }: { frozen: Frozen }) {
  const needs = frozen.outline.steps.map((step) => step.needs);
  const lists: [string, string[]][] = [
    ['Protective equipment', unique(needs.flatMap(({ protective }) => protective))],
    ['Equipment', unique(needs.flatMap(({ equipment }) => equipment))],
    ['Competencies and tickets', unique(needs.flatMap(({ competencies }) => competencies))],
    ['Permits', unique(needs.flatMap(({ permits }) => permits))],
  ];
  const filled = lists.filter(([, words]) => words.length > 0);
  if (filled.length === 0) return null;
  return (
    <section className="needs">
      <h2>What the work needs</h2>
      <div className="columns">
        {filled.map(([name, words]) => (
          <div key={name}>
            <h3>{name}</h3>
            <ul>
              {words.map((line) => (
                <li key={line}>{line}</li>
              ))}
            </ul>
          </div>
        ))}
      </div>
    </section>
  );
}

function Emergency({ frozen }: { frozen: Frozen }) {
  const lines = unique(
    [frozen.outline.particulars.emergency, frozen.site.emergency].filter((line) => line.trim() !== ''),
  );
  return (
    <section className="emergency">
      <h2>Emergency and rescue</h2>
      <p>
        <strong>Call {frozen.profile.emergencyNumber}.</strong>
      </p>
      {lines.map((line) => (
        <p key={line}>{line}</p>
      ))}
    </section>
  );
}

function Matrix({ frozen: { matrix } }: { frozen: Frozen }) {
  return (
    <section className="acceptance">
      <h2>Risk rating</h2>
      <p className="fine">{matrix.name}.</p>
      <ul>
        {bands.map((band) => (
          <li key={band}>
            <span className={`band ${band}`}>{bandNames[band]}</span> {matrix.acceptance[band]}
          </li>
        ))}
      </ul>
    </section>
  );
}

function Sources({ frozen }: { frozen: Frozen }) {
  const sources = unique(
    frozen.outline.steps.flatMap((step) =>
      step.sources.map(({ title, locator }) => (locator ? `${title}, ${locator}` : title)),
    ),
  );
  const cautions = unique(frozen.outline.steps.map(({ caution }) => caution).filter(Boolean));
  if (sources.length + cautions.length === 0) return null;
  return (
    <section className="sources fine">
      <h2>Cautions and sources</h2>
      {cautions.map((line) => (
        <p key={line}>{line}</p>
      ))}
      <ul>
        {sources.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </section>
  );
}
