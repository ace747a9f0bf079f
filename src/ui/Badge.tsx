import type { ReactNode } from 'react';

const tones = {
  plain: 'border-edge text-ink',
  attention: 'border-line text-line',
  done: 'border-lichen text-lichen',
  stop: 'border-oxide text-oxide',
};

/** A state in a word. */
export function Badge({ tone = 'plain', children }: { tone?: keyof typeof tones; children: ReactNode }) {
  return (
    <span className={`inline-block rounded border px-1.5 text-sm whitespace-nowrap ${tones[tone]}`}>
      {children}
    </span>
  );
}
