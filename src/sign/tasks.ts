import type { ToSign } from '#shared/signons/signons.api.ts';
import type { Outgoing } from './outbox.ts';

type Common = {
  key: string;
  title: string;
  /** True while it is still to be signed; a signature on its way counts as signed. */
  isOpen: boolean;
  /** The signature on this device, where it was made here. */
  outgoing: Outgoing | null;
};

/** One thing to sign. */
export type Task =
  | (Common & { kind: 'statement'; statement: ToSign['statements'][number] })
  | (Common & { kind: 'talk'; talk: ToSign['talks'][number] });

/** What stands to be signed, with what lies on the device already; what must be signed first stands first. */
export function tasksOf({ person, statements, talks }: ToSign, outgoing: Outgoing[]): Task[] {
  const mine = outgoing.filter(({ carrier, state }) => carrier.personId === person.id && state !== 'refused');
  const signOnOf = (revisionId: string) =>
    mine.find(({ signed }) => signed.kind === 'signOn' && signed.body.revisionId === revisionId) ?? null;
  const attendanceOf = (talkId: string) =>
    mine.find(({ signed }) => signed.kind === 'attendance' && signed.body.talkId === talkId) ?? null;
  return [
    ...statements.map((statement): Task => {
      const kept = signOnOf(statement.revisionId);
      return {
        kind: 'statement',
        key: statement.revisionId,
        title: statement.title,
        statement,
        outgoing: kept,
        isOpen: statement.standing !== 'signed' && !kept,
      };
    }),
    ...talks.map((talk): Task => {
      const kept = attendanceOf(talk.id);
      return {
        kind: 'talk',
        key: talk.id,
        title: talk.topic,
        talk,
        outgoing: kept,
        isOpen: !talk.attended && !kept,
      };
    }),
  ];
}
