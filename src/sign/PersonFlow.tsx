import { type ReactNode, useCallback, useEffect, useState } from 'react';
import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import { DoneScreen } from './DoneScreen.tsx';
import { LoadScreen } from './LoadScreen.tsx';
import type { Outgoing } from './outbox.ts';
import { outgoingAttendance, outgoingSignOn } from './outgoing.ts';
import { ReadingFlow } from './ReadingFlow.tsx';
import type { SignApi } from './sign-api.ts';
import { TalkFlow } from './TalkFlow.tsx';
import { type Task, tasksOf } from './tasks.ts';
import { ToSignScreen } from './ToSignScreen.tsx';
import { useBackButton } from './useBackButton.ts';
import { useLoad } from './useLoad.ts';
import { useOutgoing } from './useOutgoing.ts';
import { useReadings } from './useReadings.ts';

type View = { at: 'list' } | { at: 'task'; key: string } | { at: 'done'; id: string };

/** Everything that one person signs at one site: the list, the cards, the signature, the receipt, and back to the list. */
export function PersonFlow({
  api,
  footer,
  finishLabel = 'Back to the list',
  onFinished,
  onLeave,
}: {
  api: SignApi;
  /** What stands under the list. */
  footer?: ReactNode;
  /** The button after the last signature, and what it does; without it the list is shown. */
  finishLabel?: string;
  onFinished?: () => void;
  onLeave?: () => void;
}) {
  const { outbox, carrier, witness } = api;
  const loaded = useLoad(carrier.personId, api.toSign);
  const outgoing = useOutgoing(outbox);
  const [view, setView] = useState<View>({ at: 'list' });
  const readings = useReadings(api, loaded.value);
  const toList = useCallback(() => setView({ at: 'list' }), []);
  useBackButton(carrier.kind === 'device' && view.at !== 'list', toList);
  useFreshList(view.at === 'list', loaded.reload);
  const toSign = loaded.value;
  if (!toSign)
    return (
      <LoadScreen
        trouble={loaded.trouble}
        waiting="Fetching what there is to sign…"
        onAgain={loaded.reload}
        {...(onLeave ? { onBack: onLeave } : {})}
      />
    );
  const tasks = tasksOf(toSign, outgoing);
  const finish = async (made: Outgoing) => {
    await outbox.keep(made);
    void outbox.flush();
    setView({ at: 'done', id: made.id });
  };

  if (view.at === 'done') {
    const next = tasks.find(({ isOpen }) => isOpen);
    const goOn = () => {
      loaded.reload();
      if (next) setView({ at: 'task', key: next.key });
      else if (onFinished) onFinished();
      else toList();
    };
    return (
      <DoneScreen
        key={view.id}
        id={view.id}
        outbox={outbox}
        nextLabel={next ? `Next: ${next.title}` : finishLabel}
        onNext={goOn}
        onNewRevision={() => {
          loaded.reload();
          toList();
        }}
      />
    );
  }

  const task = view.at === 'task' ? tasks.find(({ key }) => key === view.key) : undefined;
  if (!task)
    return (
      <ToSignScreen
        toSign={toSign}
        outbox={outbox}
        outgoing={outgoing}
        footer={footer}
        onOpen={({ key }) => setView({ at: 'task', key })}
      />
    );
  if (task.kind === 'talk')
    return (
      <TalkFlow
        key={task.key}
        talk={task.talk}
        toSign={toSign}
        {...(witness ? { witness } : {})}
        onSigned={(signature) => finish(outgoingAttendance(carrier, toSign, task.talk, signature))}
        onLeave={toList}
      />
    );
  return (
    <StatementTask
      key={task.key}
      task={task}
      toSign={toSign}
      fetchReading={readings}
      {...(witness ? { witness } : {})}
      onLeave={toList}
      onSigned={(reading, signed) => finish(outgoingSignOn(carrier, toSign, reading, signed))}
    />
  );
}

function StatementTask({
  task,
  toSign,
  fetchReading,
  witness,
  onSigned,
  onLeave,
}: {
  task: Extract<Task, { kind: 'statement' }>;
  toSign: ToSign;
  fetchReading: (revisionId: string) => Promise<Reading>;
  witness?: string;
  onSigned: (reading: Reading, signed: Parameters<typeof outgoingSignOn>[3]) => Promise<void>;
  onLeave: () => void;
}) {
  // Read once: a signature that is kept meanwhile must not turn the flow into a reading again.
  const [readOnly] = useState(!task.isOpen);
  const { value: reading, trouble, reload } = useLoad(task.key, () => fetchReading(task.key));
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

/** Fetches the list again when the phone comes out of the pocket: there may be a new revision or a talk. */
function useFreshList(shown: boolean, reload: () => void): void {
  useEffect(() => {
    if (!shown) return;
    const onVisible = () => document.visibilityState === 'visible' && reload();
    document.addEventListener('visibilitychange', onVisible);
    return () => document.removeEventListener('visibilitychange', onVisible);
  });
}
