import { formatDay, formatInstant } from '#shared/kernel/work-date.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { Badge } from '../ui/Badge.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Facts } from '../ui/Facts.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { Attendance } from './Attendance.tsx';

/** A talk to be read: closed and frozen, or open for somebody who does not write talks. */
export function TalkRecord({
  talk,
  unsaved = [],
}: {
  talk: Talk;
  /** What was typed and not saved when somebody else closed it. */
  unsaved?: { field: string; mine: string }[];
}) {
  return (
    <Page
      title={talk.topic}
      lead={
        <>
          {talk.site}, {formatDay(talk.date)}, {talk.time}{' '}
          <Badge tone={talk.state === 'closed' ? 'done' : 'attention'}>{talk.state}</Badge>
        </>
      }
    >
      <Unsaved unsaved={unsaved} />
      {talk.consultation ? null : (
        <Notice>
          Briefing only, not counted as consultation: no matters raised and outcome{' '}
          {talk.state === 'closed' ? 'were' : 'are'} written.
        </Notice>
      )}
      <Section title="What it was about">
        <Facts
          facts={[
            ['Presenter', talk.presenter],
            ['Place', talk.place],
            ['Length', `${talk.minutes} minutes`],
            ['Points', <Points points={talk.points} />],
            ['Matters raised', <Prose words={talk.mattersRaised} />],
            ['Outcome', <Prose words={talk.outcome} />],
            ['Health and safety representative', talk.representativePresent ? 'Was there' : 'Was not there'],
          ]}
        />
      </Section>
      <Section title="Actions">
        <DataTable
          label="Actions"
          rows={talk.actions}
          keyOf={({ id }) => id}
          empty="None."
          columns={[
            { title: 'Action', cell: ({ words }) => words },
            { title: 'Owner', cell: ({ owner }) => owner },
            { title: 'Due', cell: ({ dueDate }) => formatDay(dueDate) },
          ]}
        />
      </Section>
      <Attendance talk={talk} />
      {talk.state === 'closed' ? <Proof talk={talk} /> : null}
    </Page>
  );
}

function Proof({ talk }: { talk: Talk }) {
  return (
    <Section title="Proof">
      <Facts
        facts={[
          [
            'Closed',
            `${talk.closedAt ? formatInstant(talk.closedAt, talk.timeZone) : ''}, by ${talk.closedBy ?? 'nobody'}`,
          ],
          ['Hash of the frozen talk', <code className="break-all">{talk.hash}</code>],
          ['Ledger entry', String(talk.ledgerSequence ?? '')],
        ]}
      />
    </Section>
  );
}

function Points({ points }: Pick<Talk, 'points'>) {
  if (points.length === 0) return <>None written</>;
  return (
    <ul className="list-disc pl-5">
      {points.map((point) => (
        <li key={point}>{point}</li>
      ))}
    </ul>
  );
}

const Prose = ({ words }: { words: string }) => (
  <span className="whitespace-pre-line">{words || 'None written'}</span>
);

function Unsaved({ unsaved }: { unsaved: { field: string; mine: string }[] }) {
  if (unsaved.length === 0) return null;
  return (
    <div className="mb-4">
      <Notice kind="stop">
        <p className="font-medium">
          Somebody else closed this talk before you saved. It can’t be changed any more. You had written:
        </p>
        <ul className="list-disc pl-5">
          {unsaved.map(({ field, mine }) => (
            <li key={field}>
              {field}: <span className="whitespace-pre-line">{mine}</span>
            </li>
          ))}
        </ul>
      </Notice>
    </div>
  );
}
