import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import type { Statement } from '#shared/statements/statements.api.ts';
import { useMayDo } from '../app/session.queries.ts';
import { Loaded } from '../ui/Loaded.tsx';
import { DraftView } from './DraftView.tsx';
import { IssuedView } from './IssuedView.tsx';
import { statementQuery } from './statements.queries.ts';
import { SubmittedView } from './SubmittedView.tsx';

/** A statement in whatever state it is. While it is written nothing is asked again behind the writer's back. */
export function StatementPage() {
  const { id = '' } = useParams();
  const query = useQuery({
    ...statementQuery(id),
    staleTime: Infinity,
    refetchOnMount: 'always',
    refetchOnWindowFocus: false,
  });
  // A cached copy may be older than the stored draft: wait for the fresh one before anything is written over it.
  if (query.isFetching && !query.isFetchedAfterMount)
    return <Loaded query={{ ...query, data: undefined, error: null } as typeof query}>{() => null}</Loaded>;
  return <Loaded query={query}>{(statement) => <InState key={statement.id} statement={statement} />}</Loaded>;
}

function InState({ statement }: { statement: Statement }) {
  const mayDo = useMayDo();
  if (statement.state === 'draft' && mayDo('statement.write'))
    return <DraftView key={statement.lockVersion} statement={statement} />;
  if (statement.state === 'draft' || statement.state === 'submitted')
    return <SubmittedView statement={statement} />;
  return <IssuedView statement={statement} />;
}
