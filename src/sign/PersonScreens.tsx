import { type ReactNode, useEffect, useState } from 'react';
import type { ToSign } from '#shared/signons/signons.api.ts';
import { DoneScreen } from './DoneScreen.tsx';
import type { Outgoing } from './outbox.ts';
import { outgoingAttendance, outgoingSignOn } from './outgoing.ts';
import { BigButton } from './pieces.tsx';
import type { SignApi } from './sign-api.ts';
import { StatementTask } from './StatementTask.tsx';
import { TalkFlow } from './TalkFlow.tsx';
import { tasksOf } from './tasks.ts';
import { ToSignScreen } from './ToSignScreen.tsx';
import { useBackButton } from './useBackButton.ts';
import { useOutgoing } from './useOutgoing.ts';
import { useReadings } from './useReadings.ts';

export type PersonScreensProps = {
  api: SignApi;
  toSign: ToSign;
  onReload: () => void;
  /** What is opened at once: one thing alone by its key, or whatever is open first. */
  start?: { only: string } | 'first';
  /** What stands under the list. */
  footer?: ReactNode;
  /** The button after the last signature and what it does; without it the list is shown. */
  finish?: { label: string; onFinish: () => void };
  onLeave?: () => void;
};

type View = { at: 'list' } | { at: 'task'; key: string } | { at: 'done'; id: string };

export function PersonScreens({ api, toSign, onReload, start, footer, finish, onLeave }: PersonScreensProps) {
  const { outbox, carrier, witness } = api;
  const tasks = tasksOf(toSign, useOutgoing(outbox));
  const firstOpen = tasks.find(({ isOpen }) => isOpen);
  const only = typeof start === 'object' ? start.only : null;
  const [view, setView] = useState<View>(() => {
    const key = only ?? (start === 'first' ? firstOpen?.key : undefined);
    return key === undefined ? { at: 'list' } : { at: 'task', key };
  });
  const readingOf = useReadings(api, toSign);
  const toList = () => setView({ at: 'list' });
  useBackButton(carrier.kind === 'device' && view.at !== 'list', toList);
  useFreshList(view.at === 'list', onReload);

  const keep = async (made: Outgoing) => {
    await outbox.keep(made);
    void outbox.flush();
    setView({ at: 'done', id: made.id });
  };

  if (view.at === 'done') {
    const next = only === null ? firstOpen : undefined;
    const goOn = () => {
      onReload();
      if (next) setView({ at: 'task', key: next.key });
      else if (finish) finish.onFinish();
      else toList();
    };
    const toNewRevision = () => {
      onReload();
      toList();
    };
    return (
      <DoneScreen
        key={view.id}
        id={view.id}
        outbox={outbox}
        nextLabel={next ? `Next: ${next.title}` : (finish?.label ?? 'Back to the list')}
        onNext={goOn}
        onNewRevision={toNewRevision}
      />
    );
  }

  const task = view.at === 'task' ? tasks.find(({ key }) => key === view.key) : undefined;
  if (!task)
    return (
      <ToSignScreen
        toSign={toSign}
        outbox={outbox}
        tasks={tasks}
        footer={footer}
        actions={
          onLeave && (
            <BigButton kind={firstOpen ? 'quiet' : 'main'} className="grow" onClick={onLeave}>
              Back
            </BigButton>
          )
        }
        onOpen={({ key }) => setView({ at: 'task', key })}
      />
    );
  const leaveTask = only !== null && onLeave ? onLeave : toList;
  const asWitness = witness ? { witness } : {};
  if (task.kind === 'talk')
    return (
      <TalkFlow
        key={task.key}
        talk={task.talk}
        toSign={toSign}
        {...asWitness}
        onSigned={(signature) => keep(outgoingAttendance(carrier, toSign, task.talk, signature))}
        onLeave={leaveTask}
      />
    );
  return (
    <StatementTask
      key={task.key}
      task={task}
      toSign={toSign}
      readingOf={readingOf}
      {...asWitness}
      onSigned={(reading, signed) => keep(outgoingSignOn(carrier, toSign, reading, signed))}
      onLeave={leaveTask}
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
