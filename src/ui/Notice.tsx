import { AlertTriangle, Check, Info } from 'lucide-react';
import type { ReactNode } from 'react';

const looks = {
  plain: { edge: 'border-zinc', icon: Info, ink: 'text-ink-soft' },
  attention: { edge: 'border-line', icon: AlertTriangle, ink: 'text-line' },
  stop: { edge: 'border-oxide', icon: AlertTriangle, ink: 'text-oxide' },
  done: { edge: 'border-lichen', icon: Check, ink: 'text-lichen' },
} as const;

/** Words in the page that matter more than the rest. `stop` is announced at once. */
export function Notice({ kind = 'plain', children }: { kind?: keyof typeof looks; children: ReactNode }) {
  const { edge, icon: Icon, ink } = looks[kind];
  return (
    <div
      role={kind === 'stop' ? 'alert' : 'note'}
      className={`flex gap-3 border-l-4 ${edge} bg-sheet px-4 py-3`}
    >
      <Icon size={20} strokeWidth={1.75} aria-hidden className={`mt-0.5 shrink-0 ${ink}`} />
      <div className="min-w-0 grow">{children}</div>
    </div>
  );
}
