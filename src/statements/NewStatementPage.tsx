import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { newId } from '#shared/kernel/ids.ts';
import { listStarters } from '#shared/library/library.api.ts';
import { createStatement, createStatementBody } from '#shared/statements/statements.api.ts';
import { paths } from '../app/paths.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { call } from '../lib/call.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { SelectField, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { statementQuery } from './statements.queries.ts';

const startersQuery = queryOptions({
  queryKey: ['starters'],
  queryFn: () => call(listStarters, {}),
  staleTime: 300_000,
});

export function NewStatementPage() {
  const starters = useQuery(startersQuery);
  const { sites } = useSiteInHand();
  return (
    <Page
      title="New statement"
      lead="A statement is for one job on one site. Begin from a starter and make it this site’s."
    >
      {sites.length === 0 ? (
        <Notice kind="attention">Add a site first: a statement is written for a site.</Notice>
      ) : null}
      <Loaded query={starters}>{({ starters: choices }) => <NewStatementForm starters={choices} />}</Loaded>
    </Page>
  );
}

function NewStatementForm({ starters }: { starters: { id: string; title: string; summary: string }[] }) {
  const [id] = useState(newId);
  const [search] = useSearchParams();
  const { siteId, sites } = useSiteInHand();
  const navigate = useNavigate();
  const client = useQueryClient();
  const form = useSendForm({
    schema: createStatementBody,
    start: { siteId: search.get('siteId') ?? siteId ?? '', title: '', starterId: starters[0]?.id ?? null },
    send: async (body) => {
      const statement = await call(createStatement, { params: { id }, body });
      client.setQueryData(statementQuery(id).queryKey, statement);
      await client.invalidateQueries({ queryKey: ['statements'], exact: false, refetchType: 'none' });
      await navigate(paths.statement(id));
    },
  });
  const { errors } = form.formState;
  const starterId = form.watch('starterId');
  return (
    <div className="max-w-lg">
      <Form form={form} act="Start writing">
        <SelectField
          label="Site"
          empty="Choose"
          choices={sites.map(({ id: value, name }) => ({ value, label: name }))}
          {...form.register('siteId')}
          error={errors.siteId ? 'Choose a site.' : undefined}
        />
        <TextField
          label="Title"
          help="What the crew calls the job: “Roof trusses by crane, Lot 7”."
          {...form.register('title')}
          error={errors.title?.message}
        />
        <SelectField
          label="Begin from"
          empty="Nothing"
          choices={starters.map(({ id: value, title }) => ({ value, label: title }))}
          help={
            starters.find((starter) => starter.id === starterId)?.summary ??
            'An empty statement; insert blocks as you go.'
          }
          {...form.register('starterId', { setValueAs: (value: string | null) => value || null })}
        />
      </Form>
    </div>
  );
}
