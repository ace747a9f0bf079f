import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { type Exception, exceptionKindNames, exceptionKinds } from '#shared/audit/audit.api.ts';
import { shortHash } from '#shared/kernel/canonical.ts';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { Filters, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { exceptionsQuery } from './audit.queries.ts';

const columns: Column<Exception>[] = [
  { title: 'Person', cell: ({ person, employer }) => `${person}, ${employer}` },
  { title: 'What', cell: ({ words }) => words },
  { title: 'Site', cell: ({ site }) => site, wide: true },
  {
    title: 'When',
    cell: ({ at, timeZone }) => (at ? formatInstant(at, timeZone) : 'Since it was issued'),
    wide: true,
  },
  {
    title: 'Evidence',
    cell: ({ evidence, person }) => (
      <Link to={evidence} aria-label={`Evidence for ${person}`}>
        Look
      </Link>
    ),
  },
];

/** The safety officer's first screen: what should be looked at first, each with its evidence. */
export function ExceptionsPage() {
  const [filters, setFilters] = useUrlFilters();
  const { sites } = useSiteInHand();
  const kind = exceptionKinds.find((candidate) => candidate === filters.kind);
  const query = useQuery(exceptionsQuery({ siteId: filters.siteId, kind }));
  return (
    <Page
      title="Exceptions"
      lead="Across all sites: what does not stand as it should, judged from the records now."
    >
      <Filters>
        <FilterSelect
          label="Site"
          empty="Every site"
          choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
          value={filters.siteId}
          onChange={(siteId) => setFilters({ siteId })}
        />
        <FilterSelect
          label="Kind"
          empty="Every kind"
          choices={exceptionKinds.map((value) => ({ value, label: exceptionKindNames[value] }))}
          value={filters.kind}
          onChange={(value) => setFilters({ kind: value })}
        />
      </Filters>
      <Loaded query={query}>
        {({ exceptions, counts, ledger }) => (
          <>
            <ul className="flex flex-wrap gap-x-6 gap-y-1">
              {exceptionKinds.map((value) => (
                <li key={value} className={(counts[value] ?? 0) > 0 ? 'text-line' : 'text-ink-soft'}>
                  <span className="text-xl font-semibold tabular-nums">{counts[value] ?? 0}</span>{' '}
                  {exceptionKindNames[value].toLowerCase()}
                </li>
              ))}
            </ul>
            {exceptions.length === 0 ? (
              <p className="mt-6 text-lichen">
                Nothing to look at: everybody expected has signed what is in force.
              </p>
            ) : null}
            {exceptionKinds.map((value) => {
              const rows = exceptions.filter((exception) => exception.kind === value);
              return rows.length === 0 ? null : (
                <Section key={value} title={`${exceptionKindNames[value]}, ${rows.length}`}>
                  <DataTable
                    label={exceptionKindNames[value]}
                    rows={rows}
                    columns={columns}
                    keyOf={({ personId, evidence, words }) => personId + evidence + words}
                    empty=""
                  />
                </Section>
              );
            })}
            <p className="lip mt-8 text-sm text-ink-soft">
              Ledger: {ledger.entries} entries{ledger.hash ? `, head ${shortHash(ledger.hash)}` : ''}. It is
              checked with <code>npm run verify</code>.
            </p>
          </>
        )}
      </Loaded>
    </Page>
  );
}
