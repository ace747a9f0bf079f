import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Filters, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { sitesQuery } from './sites.queries.ts';

export function SiteListPage() {
  const [filters, setFilters] = useUrlFilters();
  const mayDo = useMayDo();
  const query = useQuery(sitesQuery(filters.archived === 'yes' ? 'yes' : 'no'));
  return (
    <Page
      title="Sites"
      actions={
        mayDo('site.manage') ? (
          <ButtonLink kind="filled" icon={Plus} to={paths.newSite}>
            New site
          </ButtonLink>
        ) : null
      }
    >
      <Filters>
        <FilterSelect
          label="List"
          empty="Open sites"
          choices={[{ value: 'yes', label: 'Closed sites' }]}
          value={filters.archived}
          onChange={(archived) => setFilters({ archived })}
        />
      </Filters>
      <Loaded query={query}>
        {({ sites }) => (
          <DataTable
            label="Sites"
            rows={sites}
            keyOf={({ id }) => id}
            linkOf={({ id }) => paths.site(id)}
            empty="No site here. Add one: a statement is written for a site."
            columns={[
              { title: 'Name', cell: ({ name }) => name },
              { title: 'Address', cell: ({ address }) => address },
              {
                title: 'Principal contractor',
                cell: ({ principalContractor }) => principalContractor || '—',
                wide: true,
              },
              { title: 'Crew', cell: ({ crew }) => crew, numeric: true },
            ]}
          />
        )}
      </Loaded>
    </Page>
  );
}
