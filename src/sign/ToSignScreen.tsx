import { formatDay, formatInstant, workDateOf } from '#shared/kernel/work-date.ts';
import type { ToSign } from '#shared/signons/signons.api.ts';
import type { Outbox } from './outbox.ts';
import { OutgoingStatus } from './OutgoingStatus.tsx';
import { BigButton, Screen, Section } from './pieces.tsx';
import type { Task } from './tasks.ts';

/** What one person has to sign at one site, and what is signed already. */
export function ToSignScreen({
  toSign,
  outbox,
  tasks,
  footer,
  actions,
  onOpen,
}: {
  toSign: ToSign;
  outbox: Outbox;
  tasks: Task[];
  footer?: React.ReactNode;
  actions?: React.ReactNode;
  onOpen: (task: Task) => void;
}) {
  const open = tasks.filter(({ isOpen }) => isOpen).length;
  return (
    <Screen title={headingOf(toSign.person.name, open)} actions={actions}>
      <TaskList toSign={toSign} tasks={tasks} outbox={outbox} onOpen={onOpen} />
      {footer}
    </Screen>
  );
}

/** The things to sign as cards, and the signed ones under them. */
export function TaskList({
  toSign,
  tasks,
  outbox,
  onOpen,
}: {
  toSign: ToSign;
  tasks: Task[];
  outbox: Outbox;
  onOpen: (task: Task) => void;
}) {
  const open = tasks.filter(({ isOpen }) => isOpen);
  const finished = tasks.filter(({ isOpen }) => !isOpen);
  return (
    <>
      {tasks.length === 0 && (
        <p className="mt-2 text-[1.125rem]">
          No statement is in force for this site and no talk is open. Ask your supervisor before you start.
        </p>
      )}
      <ul className="mt-3 space-y-4">
        {open.map((task, index) => (
          <OpenTask key={task.key} task={task} first={index === 0} toSign={toSign} onOpen={onOpen} />
        ))}
      </ul>
      {finished.length > 0 && (
        <Section title="Signed">
          <ul className="space-y-4">
            {finished.map((task) => (
              <FinishedTask key={task.key} task={task} toSign={toSign} outbox={outbox} onOpen={onOpen} />
            ))}
          </ul>
        </Section>
      )}
    </>
  );
}

function headingOf(name: string, open: number): string {
  if (open === 0) return `${name}, nothing left to sign here`;
  return open === 1 ? `${name}, 1 thing to sign` : `${name}, ${open} things to sign`;
}

type TaskProps = { task: Task; toSign: ToSign; onOpen: (task: Task) => void };

function OpenTask({ task, toSign, first, onOpen }: TaskProps & { first: boolean }) {
  const { words, button } = openWords(task, toSign);
  return (
    <li className="rounded-[3px] border border-zinc bg-sheet p-4">
      <h2 className="text-[1.125rem] font-semibold">{task.title}</h2>
      {words.map((line) => (
        <p key={line} className="mt-1">
          {line}
        </p>
      ))}
      <BigButton
        kind={first ? 'main' : 'quiet'}
        className="mt-3 w-full text-[1.125rem]"
        aria-label={`${button}: ${task.title}`}
        onClick={() => onOpen(task)}
      >
        {button}
      </BigButton>
    </li>
  );
}

function openWords(task: Task, { site }: ToSign): { words: string[]; button: string } {
  if (task.kind === 'talk') {
    const { date, time, place, presenter } = task.talk;
    return {
      words: [`Toolbox talk, ${formatDay(date)}, ${time}, ${place}. Presented by ${presenter}.`],
      button: 'Sign that you were there',
    };
  }
  const { number, issuedAt, standing, changeNote } = task.statement;
  const issued = `Revision ${number}, issued ${formatDay(workDateOf(new Date(issuedAt), site.timeZone))}.`;
  if (standing === 'open') return { words: [issued, 'You have not signed it.'], button: 'Read and sign' };
  return {
    words: [
      issued,
      'You signed an older revision, which no longer counts.',
      ...(changeNote ? [`What is different: ${changeNote}`] : []),
    ],
    button: 'Read and sign again',
  };
}

function FinishedTask({ task, toSign, outbox, onOpen }: TaskProps & { outbox: Outbox }) {
  const signedAt = task.kind === 'statement' ? task.statement.signedAt : null;
  return (
    <li>
      <h3 className="font-semibold">{task.title}</h3>
      {task.outgoing ? (
        <OutgoingStatus outgoing={task.outgoing} durable={outbox.isDurable()} />
      ) : (
        <p className="text-lichen">
          {signedAt
            ? `You signed this ${formatInstant(signedAt, toSign.site.timeZone)}.`
            : 'You signed this.'}
        </p>
      )}
      {task.kind === 'statement' && (
        <BigButton
          kind="quiet"
          className="mt-2"
          aria-label={`Read again: ${task.title}`}
          onClick={() => onOpen(task)}
        >
          Read again
        </BigButton>
      )}
    </li>
  );
}
