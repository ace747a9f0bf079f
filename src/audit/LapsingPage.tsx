import { useQuery } from '@tanstack/react-query';
import { formatDay } from '#shared/kernel/work-date.ts';
import { paths } from '../app/paths.ts';
import { Badge } from '../ui/Badge.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { lapsingQuery } from './audit.queries.ts';

/** The administrator's first screen: what runs out if nobody does anything. */
export function LapsingPage() {
  const query = useQuery(lapsingQuery);
  return (
    <Page title="Lapsing" lead="What runs out within a month, or has.">
      <Loaded query={query}>
        {({ reviews, invitations }) => (
          <>
            <Section title="Statement reviews">
              <DataTable
                label="Reviews"
                rows={reviews}
                keyOf={({ statementId }) => statementId}
                linkOf={({ statementId }) => paths.statement(statementId)}
                empty="No review is due within a month."
                columns={[
                  { title: 'Statement', cell: ({ title }) => title },
                  { title: 'Site', cell: ({ site }) => site },
                  { title: 'Review', cell: ({ reviewDate }) => formatDay(reviewDate) },
                  {
                    title: 'State',
                    cell: ({ overdue }) => (
                      <Badge tone={overdue ? 'attention' : 'plain'}>{overdue ? 'Overdue' : 'Due'}</Badge>
                    ),
                  },
                ]}
              />
            </Section>
            <Section title="Invitations not taken up">
              <DataTable
                label="Invitations"
                rows={invitations}
                keyOf={({ accountId }) => accountId}
                empty="Everybody invited has joined."
                columns={[
                  { title: 'Name', cell: ({ name }) => name },
                  { title: 'E-mail', cell: ({ email }) => email },
                  { title: 'Invited', cell: ({ invitedAt }) => new Date(invitedAt).toLocaleDateString() },
                ]}
              />
            </Section>
          </>
        )}
      </Loaded>
    </Page>
  );
}
