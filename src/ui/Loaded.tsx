import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { wordsOf } from '../lib/query.ts';
import { Button } from './Button.tsx';
import { Notice } from './Notice.tsx';

/** What a query is for: its data drawn, or words while it is on its way or failed. */
export function Loaded<T>({
  query,
  children,
}: {
  query: UseQueryResult<T>;
  children: (data: T) => ReactNode;
}) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (query.error) {
    return (
      <Notice kind="stop">
        <p>{wordsOf(query.error)}</p>
        <Button className="mt-2" onClick={() => void query.refetch()}>
          Try again
        </Button>
      </Notice>
    );
  }
  return <Waiting />;
}

export function Waiting({ words = 'Loading…' }: { words?: string }) {
  return (
    <p role="status" className="py-6 text-ink-soft">
      {words}
    </p>
  );
}
