import { formatTime } from '#shared/kernel/work-date.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { DataTable } from '../ui/DataTable.tsx';
import { Section } from '../ui/Page.tsx';
import { SignaturePicture } from '../ui/SignaturePicture.tsx';

type Attendee = Talk['attendance'][number];

/** Who has signed the talk, and who of the crew has not. */
export function Attendance({ talk }: { talk: Talk }) {
  const { attendance, missing, timeZone, state } = talk;
  const expected = attendance.length + missing.length;
  return (
    <Section title={`Signed by ${attendance.length} of ${expected}`}>
      <div aria-live="polite">
        <DataTable
          label="Who signed"
          rows={attendance}
          keyOf={({ id }) => id}
          empty={state === 'open' ? 'Nobody has signed yet.' : 'Nobody signed.'}
          columns={[
            { title: 'Name', cell: ({ name }) => name },
            { title: 'Employer', cell: ({ employer }) => employer, wide: true },
            { title: 'Time', cell: ({ signedAt }) => formatTime(signedAt, timeZone) },
            { title: 'Signature', cell: (attendee) => <Signature attendee={attendee} /> },
            {
              title: 'Device',
              cell: ({ handedRoundBy }) => (handedRoundBy ? `of ${handedRoundBy}` : 'their own'),
              wide: true,
            },
          ]}
        />
        {missing.length > 0 ? (
          <p className="mt-3">
            <span className="font-medium">
              {missing.length === 1 ? '1 of the crew has' : `${missing.length} of the crew have`} not signed:
            </span>{' '}
            {missing.map(({ name }) => name).join(', ')}
          </p>
        ) : null}
      </div>
    </Section>
  );
}

function Signature({ attendee: { svg, typedName, witness, name } }: { attendee: Attendee }) {
  if (svg) return <SignaturePicture svg={svg} of={name} small />;
  return (
    <>
      {typedName}, typed; witness {witness}
    </>
  );
}
