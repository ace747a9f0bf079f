import { useQuery } from '@tanstack/react-query';
import { Download, Users } from 'lucide-react';
import { formatInstant } from '#shared/kernel/work-date.ts';
import {
  getRegisterCsv,
  type RegisterRow,
  registerStatuses,
  registerStatusNames,
} from '#shared/signons/register.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { addressOf } from '../lib/call.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { employersQuery } from '../people/people.queries.ts';
import { statementsQuery } from '../statements/statements.queries.ts';
import { Badge } from '../ui/Badge.tsx';
import { ButtonLink } from '../ui/Button.tsx';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { Filters, FilterSearch, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { countsInWords, countsOf, durationInWords, groupsOf, type StatementGroup } from './register-words.ts';
import { registerUrl, type RegisterUrl } from './register-url.ts';
import { registerRowsQuery } from './signons.queries.ts';

/** Who has signed what is in force, who signed something older, and who has not. */
export function RegisterPage() {
  const [filters, setFilters] = useUrlFilters();
  const shown = registerUrl.parse(filters);
  // The standing is chosen here, so that the counts stay of all.
  const { status, ...scope } = shown;
  const query = useQuery(registerRowsQuery(scope));
  return (
    <Page
      title="Register"
      lead="Who has signed the statements in force, site by site."
      wide
      actions={
        <ButtonLink icon={Download} outside to={addressOf(getRegisterCsv, { query: shown })}>
          CSV of what is shown
        </ButtonLink>
      }
    >
      <RegisterFilters shown={shown} onChange={setFilters} />
      <Loaded query={query}>
        {({ rows }) => {
          const groups = groupsOf(rows);
          if (groups.length === 0) return <Nothing filtered={Object.keys(filters).length > 0} />;
          return groups.map((group) => (
            <Group
              key={group.statementId}
              group={group}
              status={status}
              sort={{
                by: shown.sort,
                direction: shown.direction,
                onChange: (sort, direction) => setFilters({ sort, direction }),
              }}
            />
          ));
        }}
      </Loaded>
    </Page>
  );
}

function RegisterFilters({
  shown,
  onChange,
}: {
  shown: RegisterUrl;
  onChange: (change: Record<string, string | undefined>) => void;
}) {
  const { sites } = useSiteInHand();
  const statements = useQuery(statementsQuery({ siteId: shown.siteId }));
  const employers = useQuery(employersQuery);
  const inForce = (statements.data?.statements ?? []).filter(
    ({ currentRevision }) => currentRevision !== null,
  );
  return (
    <Filters>
      <FilterSearch label="Name" value={shown.search} onChange={(search) => onChange({ search })} />
      <FilterSelect
        label="Site"
        empty="Every site"
        value={shown.siteId}
        choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(siteId) => onChange({ siteId, statementId: undefined })}
      />
      <FilterSelect
        label="Statement"
        empty="Every statement in force"
        value={shown.statementId}
        choices={inForce.map(({ id, title }) => ({ value: id, label: title }))}
        onChange={(statementId) => onChange({ statementId })}
      />
      <FilterSelect
        label="Standing"
        empty="Signed or not"
        value={shown.status}
        choices={registerStatuses.map((value) => ({ value, label: registerStatusNames[value] }))}
        onChange={(status) => onChange({ status })}
      />
      <FilterSelect
        label="Employer"
        empty="Every employer"
        value={shown.employerId}
        choices={(employers.data?.employers ?? []).map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(employerId) => onChange({ employerId })}
      />
    </Filters>
  );
}

function Nothing({ filtered }: { filtered: boolean }) {
  return (
    <p className="border-t border-zinc py-6 text-ink-soft">
      {filtered
        ? 'Nobody matches these filters.'
        : 'No statement is in force yet. Issue one, put people on the site’s crew, and they stand here.'}
    </p>
  );
}

const columns: Column<RegisterRow>[] = [
  { title: 'Name', sort: 'name', cell: ({ name }) => name },
  { title: 'Standing', sort: 'status', cell: (row) => <Standing row={row} /> },
  { title: 'Employer', sort: 'employer', cell: ({ employer }) => employer, wide: true },
  { title: 'Trade', cell: ({ trade }) => trade, wide: true },
  {
    title: 'Signed',
    sort: 'signedAt',
    cell: ({ signOn, timeZone }) =>
      signOn ? `Revision ${signOn.revision}, ${formatInstant(signOn.signedAt, timeZone)}` : 'Not yet',
  },
  { title: 'How', cell: ({ signOn }) => (signOn ? howInWords(signOn) : ''), wide: true },
  {
    title: 'Read for',
    cell: ({ signOn }) => (signOn ? durationInWords(signOn.readingMs) : ''),
    wide: true,
    numeric: true,
  },
];

function howInWords({ method, handedRoundBy }: NonNullable<RegisterRow['signOn']>): string {
  const how = method === 'drawn' ? 'Drawn' : 'Typed before a witness';
  return handedRoundBy ? `${how}, device of ${handedRoundBy}` : `${how}, own phone or sign-in`;
}

const tones = { current: 'done', older: 'attention', none: 'attention' } as const;

function Standing({ row: { status, onCrew } }: { row: RegisterRow }) {
  return (
    <>
      <Badge tone={tones[status]}>{registerStatusNames[status]}</Badge>
      {onCrew ? null : <span className="text-ink-soft"> not on the crew now</span>}
    </>
  );
}

function Group({
  group,
  status,
  sort,
}: {
  group: StatementGroup;
  status: RegisterRow['status'] | undefined;
  sort: NonNullable<Parameters<typeof DataTable<RegisterRow>>[0]['sort']>;
}) {
  const mayTake = useMayDo()('signon.take');
  const counts = countsOf(group.rows);
  const rows = status ? group.rows.filter((row) => row.status === status) : group.rows;
  return (
    <Section
      title={`${group.statement}, ${group.site}`}
      actions={
        mayTake && counts.older + counts.none > 0 ? (
          <ButtonLink icon={Users} to={paths.handedRound(group.siteId)}>
            Hand the device round
          </ButtonLink>
        ) : null
      }
    >
      <p className="mb-2">{countsInWords(counts, group.currentRevision)}</p>
      <DataTable
        label={`Register of ${group.statement}`}
        rows={rows}
        columns={columns}
        keyOf={({ personId }) => personId}
        linkOf={({ signOn, personId }) => (signOn ? paths.signOn(signOn.id) : paths.person(personId))}
        empty="Nobody here has this standing."
        sort={sort}
      />
    </Section>
  );
}
