import type { ReactNode } from 'react';

/** Terms and what is known of them, one a line. */
export function Facts({ facts }: { facts: [term: string, fact: ReactNode][] }) {
  return (
    <dl className="grid gap-x-6 gap-y-1 sm:grid-cols-[12rem_1fr]">
      {facts.map(([term, fact]) => (
        <div key={term} className="contents">
          <dt className="text-ink-soft">{term}</dt>
          <dd className="mb-2 min-w-0 break-words sm:mb-0">{fact}</dd>
        </div>
      ))}
    </dl>
  );
}
