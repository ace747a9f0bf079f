import { useQuery } from '@tanstack/react-query';
import { Building2, UserPlus } from 'lucide-react';
import type { Person } from '#shared/people/people.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { Filters, FilterSearch, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { employersQuery, peopleQuery } from './people.queries.ts';

const columns: Column<Person>[] = [
  { title: 'Name', cell: ({ name }) => name },
  { title: 'Employer', cell: ({ employer }) => employer },
  { title: 'Trade', cell: ({ trade }) => trade, wide: true },
  { title: 'Sites', cell: ({ sites }) => sites.map(({ name }) => name).join(', ') || 'None', wide: true },
  { title: 'Sign-in', cell: ({ signIn }) => (signIn ? 'Yes' : 'Not needed'), wide: true },
];

export function PeopleListPage() {
  const [filters, setFilters] = useUrlFilters();
  const mayDo = useMayDo();
  const { sites } = useSiteInHand();
  const employers = useQuery(employersQuery);
  const query = useQuery(
    peopleQuery({
      search: filters.search,
      siteId: filters.siteId,
      employerId: filters.employerId,
      archived: filters.archived === 'yes' ? 'yes' : 'no',
    }),
  );
  return (
    <Page
      title="People"
      lead="Everybody who works on your sites, with or without a sign-in."
      actions={
        <>
          <ButtonLink to={paths.employers} icon={Building2}>
            Employers
          </ButtonLink>
          {mayDo('person.manage') ? (
            <ButtonLink kind="filled" to={paths.newPerson} icon={UserPlus}>
              New person
            </ButtonLink>
          ) : null}
        </>
      }
    >
      <Filters>
        <FilterSearch label="Name" value={filters.search} onChange={(search) => setFilters({ search })} />
        <FilterSelect
          label="Site"
          empty="Every site"
          value={filters.siteId}
          choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
          onChange={(siteId) => setFilters({ siteId })}
        />
        <FilterSelect
          label="Employer"
          empty="Every employer"
          value={filters.employerId}
          choices={(employers.data?.employers ?? []).map(({ id, name }) => ({ value: id, label: name }))}
          onChange={(employerId) => setFilters({ employerId })}
        />
        <FilterSelect
          label="List"
          empty="On the list"
          value={filters.archived}
          choices={[{ value: 'yes', label: 'Taken off' }]}
          onChange={(archived) => setFilters({ archived })}
        />
      </Filters>
      <Loaded query={query}>
        {({ people }) => (
          <DataTable
            label="People"
            rows={people}
            columns={columns}
            keyOf={({ id }) => id}
            linkOf={({ id }) => paths.person(id)}
            empty="Nobody matches. Add a person, or let people enrol themselves with the code on the site board."
          />
        )}
      </Loaded>
    </Page>
  );
}
