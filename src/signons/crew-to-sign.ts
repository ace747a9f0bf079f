import type { RegisterRow } from '#shared/signons/register.api.ts';
import type { Talk } from '#shared/talks/talks.api.ts';

/** One of the crew with what is still to be signed, in words. */
export type CrewMember = { personId: string; name: string; employer: string; open: string[] };

type OpenTalk = Pick<Talk, 'topic' | 'missing'>;

/** The crew with what each has still to sign; who has nothing left stands last, else by name. */
export function crewToSign(
  people: { id: string; name: string; employer: string }[],
  rows: Pick<RegisterRow, 'personId' | 'status' | 'statement' | 'currentRevision'>[],
  talks: OpenTalk[],
): CrewMember[] {
  return people
    .map(({ id, name, employer }) => ({
      personId: id,
      name,
      employer,
      open: [
        ...rows
          .filter(({ personId, status }) => personId === id && status !== 'current')
          .map(({ statement, currentRevision, status }) =>
            status === 'older'
              ? `${statement}, revision ${currentRevision} again`
              : `${statement}, revision ${currentRevision}`,
          ),
        ...talks
          .filter(({ missing }) => missing.some(({ personId }) => personId === id))
          .map(({ topic }) => `talk: ${topic}`),
      ],
    }))
    .toSorted(
      (a, b) =>
        Number(a.open.length === 0) - Number(b.open.length === 0) || a.name.localeCompare(b.name, 'en'),
    );
}

/** "3 of 9 have nothing left to sign." Of a talk: "3 of 9 have signed the talk …" */
export function signersInWords(members: CrewMember[], topic: string | null): string {
  const finished = members.filter(({ open }) => open.length === 0).length;
  const have = finished === 1 ? 'has' : 'have';
  return topic === null
    ? `${finished} of ${members.length} ${have} nothing left to sign.`
    : `${finished} of ${members.length} ${have} signed the talk “${topic}”.`;
}
