import { z } from 'zod';
import { newId } from '#shared/kernel/ids.ts';
import { workDateOf, formatTime } from '#shared/kernel/work-date.ts';
import { type Talk, talkBody } from '#shared/talks/talks.api.ts';

/** The talk as a form: points one a line. */
export const talkForm = talkBody.extend({
  points: z.string().transform(linesOf).pipe(talkBody.shape.points.unwrap()),
});
export type TalkFormInput = z.input<typeof talkForm>;

export function linesOf(text: string): string[] {
  return text
    .split('\n')
    .map((line) => line.replace(/^\s*[-*•]\s+/, '').trim())
    .filter(Boolean);
}

/** What a new talk starts with: now, at the site. */
export function newTalkForm(
  { siteId, timeZone, presenter }: { siteId: string; timeZone: string; presenter: string },
  now = new Date(),
): TalkFormInput {
  return {
    siteId,
    topic: '',
    presenter,
    date: workDateOf(now, timeZone),
    time: formatTime(now, timeZone),
    minutes: 10,
    place: '',
    points: '',
    mattersRaised: '',
    outcome: '',
    representativePresent: false,
    actions: [],
  };
}

export function formOf(talk: Talk): TalkFormInput {
  return {
    siteId: talk.siteId,
    topic: talk.topic,
    presenter: talk.presenter,
    date: talk.date,
    time: talk.time,
    minutes: talk.minutes,
    place: talk.place,
    points: talk.points.join('\n'),
    mattersRaised: talk.mattersRaised,
    outcome: talk.outcome,
    representativePresent: talk.representativePresent,
    actions: talk.actions,
  };
}

export const newAction = (dueDate: string) => ({ id: newId(), words: '', owner: '', dueDate });

const fieldNames: Record<keyof TalkFormInput, string> = {
  siteId: 'Site',
  topic: 'Topic',
  presenter: 'Presenter',
  date: 'Date',
  time: 'Time',
  minutes: 'Minutes',
  place: 'Place',
  points: 'Points',
  mattersRaised: 'Matters raised',
  outcome: 'Outcome',
  representativePresent: 'Representative present',
  actions: 'Actions',
};

/** Where what stands in the form differs from a saved talk, each side in words. */
export function differences(
  mine: TalkFormInput,
  saved: Talk,
): { field: string; mine: string; theirs: string }[] {
  const theirs = formOf(saved);
  return (Object.keys(fieldNames) as (keyof TalkFormInput)[])
    .filter((name) => JSON.stringify(theirs[name]) !== JSON.stringify(mine[name]))
    .map((name) =>
      name === 'siteId'
        ? { field: fieldNames[name], mine: 'another site', theirs: saved.site }
        : { field: fieldNames[name], mine: inWords(mine, name), theirs: inWords(theirs, name) },
    );
}

function inWords(form: TalkFormInput, name: keyof TalkFormInput): string {
  if (name === 'actions')
    return (form.actions ?? []).map(({ words, owner }) => `${words} (${owner})`).join('; ') || 'none';
  if (name === 'representativePresent') return form.representativePresent ? 'yes' : 'no';
  return String(form[name] ?? '') || 'empty';
}
