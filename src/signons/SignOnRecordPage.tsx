import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { shortHash } from '#shared/kernel/canonical.ts';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { languageNames } from '#shared/people/people.api.ts';
import { readTooFast } from '#shared/signons/cards.ts';
import type { SignOnRecord } from '#shared/signons/register.api.ts';
import { paths } from '../app/paths.ts';
import { Badge } from '../ui/Badge.tsx';
import { Facts } from '../ui/Facts.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { SignaturePicture } from '../ui/SignaturePicture.tsx';
import { durationInWords } from './register-words.ts';
import { signOnQuery } from './signons.queries.ts';

/** One sign-on with everything that was kept of it. */
export function SignOnRecordPage() {
  const { id = '' } = useParams();
  const query = useQuery(signOnQuery(id));
  return <Loaded query={query}>{(record) => <Kept record={record} />}</Loaded>;
}

const standings = {
  current: { tone: 'done', words: 'Current revision' },
  superseded: { tone: 'attention', words: 'Superseded since' },
  withdrawn: { tone: 'stop', words: 'Withdrawn since' },
} as const;

function Kept({ record }: { record: SignOnRecord }) {
  const { person, standing } = record;
  return (
    <Page
      title={`Sign-on of ${person.name}`}
      lead={
        <>
          <Link to={paths.revision(record.statementId, record.revision)} className="underline">
            {record.statement}, revision {record.revision}
          </Link>
          , {record.site} <Badge tone={standings[standing].tone}>{standings[standing].words}</Badge>
        </>
      }
    >
      <Signed record={record} />
      <Section title="Who">
        <Facts
          facts={[
            ['Name', <Link to={paths.person(person.id)}>{person.name}</Link>],
            ['Employer', person.employer],
            ['Trade', person.trade],
            ['Induction card', person.inductionCard || 'None given'],
          ]}
        />
        <p className="mt-2 text-ink-soft">As they stood when they signed.</p>
      </Section>
      <Section title="When and on what">
        <WhenAndOnWhat record={record} />
      </Section>
      <Section title="Reading">
        <Reading record={record} />
      </Section>
      <Section title="Check questions">
        <Answers answers={record.answers} />
      </Section>
      <Section title="Proof">
        <Facts
          facts={[
            [
              'Hash of the revision',
              <>
                <code className="break-all">{record.revisionHash}</code>{' '}
                <Link to={paths.verify(record.revisionHash)}>Verify {shortHash(record.revisionHash)}</Link>
              </>,
            ],
            ['Ledger entry', String(record.ledger.sequence)],
            ['Hash of the entry', <code className="break-all">{record.ledger.hash}</code>],
            ['Sign-on', <code className="break-all">{record.id}</code>],
          ]}
        />
      </Section>
    </Page>
  );
}

function Signed({ record }: { record: SignOnRecord }) {
  const { declaration, svg, typedName, witness, person } = record;
  return (
    <Section title="What was signed">
      <div
        lang={declaration.language}
        className="mb-4 max-w-[68ch] border-l-4 border-zinc bg-sheet px-4 py-3"
      >
        {declaration.words.map((line) => (
          <p key={line} className="mb-1">
            {line}
          </p>
        ))}
      </div>
      {svg ? <SignaturePicture svg={svg} of={person.name} /> : null}
      {typedName ? (
        <p>
          Typed as the signature: <strong>{typedName}</strong>. Witness: <strong>{witness}</strong>.
        </p>
      ) : null}
      <p className="mt-2 text-ink-soft">
        Declaration {declaration.id}, version {declaration.version}
      </p>
    </Section>
  );
}

function WhenAndOnWhat({ record }: { record: SignOnRecord }) {
  const { signedAt, receivedAt, timeZone, handedRoundBy } = record;
  return (
    <Facts
      facts={[
        ['Signed, by the device', `${formatInstant(signedAt, timeZone)} (${signedAt})`],
        ['Received at the server', `${formatInstant(receivedAt, timeZone)} (${receivedAt})`],
        ['Time zone', timeZone],
        ['Between the two', delayInWords(signedAt, receivedAt)],
        ['Device', record.device || 'Not told'],
        ['Handed round by', handedRoundBy ?? 'Nobody: the person’s own phone or sign-in'],
        ['Language', languageNames[record.language]],
      ]}
    />
  );
}

/** How long the signature was on its way; a device whose clock runs ahead says so. */
function delayInWords(signedAt: string, receivedAt: string): string {
  const ms = Date.parse(receivedAt) - Date.parse(signedAt);
  return ms < 0 ? `The device’s clock was ${durationInWords(-ms)} ahead` : durationInWords(ms);
}

function Reading({ record: { wordsOnCards, readingMs } }: { record: SignOnRecord }) {
  return (
    <>
      <p>
        {wordsOnCards} words on the cards, open in sight for {durationInWords(readingMs)}.
      </p>
      {readTooFast(wordsOnCards, readingMs) ? (
        <div className="mt-3">
          <Notice kind="attention">
            Faster than a person can read. It may have been explained aloud, or not been read: ask.
          </Notice>
        </div>
      ) : null}
    </>
  );
}

function Answers({ answers }: Pick<SignOnRecord, 'answers'>) {
  if (answers.length === 0) return <p className="text-ink-soft">None were asked.</p>;
  return (
    <ol className="list-decimal space-y-3 pl-6">
      {answers.map(({ question, tries, right }) => (
        <li key={question}>
          <p className="font-medium">{question}</p>
          <p>
            {tries.length === 0 ? 'Not answered' : tries.join(', then ')}{' '}
            {tries.length > 0 ? (
              <Badge tone={right && tries.length === 1 ? 'done' : 'attention'}>
                {right
                  ? tries.length === 1
                    ? 'right at once'
                    : `right at try ${tries.length}`
                  : 'not right'}
              </Badge>
            ) : null}
          </p>
        </li>
      ))}
    </ol>
  );
}
