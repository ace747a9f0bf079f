import { useState } from 'react';
import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import { LoadScreen } from './LoadScreen.tsx';
import type { SignedReading } from './outgoing.ts';
import { ReadingFlow } from './ReadingFlow.tsx';
import type { Task } from './tasks.ts';
import { useLoad } from './useLoad.ts';

/** One statement from the list, fetched and opened. */
export function StatementTask({
  task,
  toSign,
  readingOf,
  witness,
  onSigned,
  onLeave,
}: {
  task: Extract<Task, { kind: 'statement' }>;
  toSign: ToSign;
  readingOf: (revisionId: string) => Promise<Reading>;
  witness?: string;
  onSigned: (reading: Reading, signed: SignedReading) => Promise<void>;
  onLeave: () => void;
}) {
  // Asked once: a signature that is kept meanwhile must not turn the flow into a mere reading.
  const [readOnly] = useState(!task.isOpen);
  const { value: reading, trouble, reload } = useLoad(task.key, () => readingOf(task.key));
  if (!reading)
    return (
      <LoadScreen trouble={trouble} waiting="Fetching the statement…" onAgain={reload} onBack={onLeave} />
    );
  return (
    <ReadingFlow
      reading={reading}
      person={toSign.person}
      changeNote={task.statement.standing === 'older' ? task.statement.changeNote : null}
      readOnly={readOnly}
      {...(witness ? { witness } : {})}
      onSigned={(signed) => onSigned(reading, signed)}
      onLeave={onLeave}
    />
  );
}
