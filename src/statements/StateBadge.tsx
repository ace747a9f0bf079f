import type { StatementRow } from '#shared/statements/statements.api.ts';
import { Badge } from '../ui/Badge.tsx';
import { stateNames } from './state-names.ts';

const tones = { draft: 'plain', submitted: 'attention', issued: 'done', withdrawn: 'stop' } as const;

export function StateBadge({ state }: Pick<StatementRow, 'state'>) {
  return <Badge tone={tones[state]}>{stateNames[state]}</Badge>;
}
