import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { formatTime } from '#shared/kernel/work-date.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { sitesQuery } from '../sites/sites.queries.ts';
import { Button } from '../ui/Button.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { Attendance } from './Attendance.tsx';
import { CloseTalk } from './CloseTalk.tsx';
import { DiscardTalk } from './DiscardTalk.tsx';
import { SignTalk } from './SignTalk.tsx';
import { differences, formOf } from './talk-form.ts';
import { TalkForm } from './TalkForm.tsx';
import { TalkRecord } from './TalkRecord.tsx';
import { type TalkEditing, useTalkEditing } from './useTalkEditing.ts';

/** An open talk: its words, its attendance as it grows, and its closing. */
export function OpenTalk({ talk, onMounted }: { talk: Talk; onMounted: () => void }) {
  const sites = useQuery(sitesQuery('no'));
  const editing = useTalkEditing({ id: talk.id, start: formOf(talk), lockVersion: talk.lockVersion });
  const { form, lockVersion, savedAt } = editing;
  const unsaved = form.formState.isDirty;
  useEffect(onMounted, [onMounted]);
  if (talk.state === 'closed')
    return <TalkRecord talk={talk} unsaved={unsaved ? differences(form.getValues(), talk) : []} />;
  return (
    <Page
      title={talk.topic}
      lead={`Open talk, ${talk.site}`}
      actions={
        <>
          {talk.attendance.length === 0 ? <DiscardTalk talk={talk} /> : null}
          <CloseTalk talk={talk} lockVersion={lockVersion} unsaved={unsaved} />
        </>
      }
    >
      <Attendance talk={talk} />
      <SignTalk talk={talk} />
      <Section title="What it was about">
        <Conflict editing={editing} />
        <TalkForm
          form={form}
          sites={sites.data?.sites ?? []}
          siteIsFixed={talk.attendance.length > 0}
          act="Save"
          extra={
            <p role="status" className="self-center text-ink-soft">
              {unsaved ? 'Not saved yet' : savedAt ? `Saved ${formatTime(savedAt, talk.timeZone)}` : ''}
            </p>
          }
        />
      </Section>
    </Page>
  );
}

/** Somebody else saved first: what differs, and which is to stand. Nothing typed is lost meanwhile. */
function Conflict({ editing: { conflict, form, keepMine, takeTheirs } }: { editing: TalkEditing }) {
  if (!conflict) return null;
  return (
    <div className="mb-4">
      <Notice kind="stop">
        <p className="font-medium">
          Somebody else saved this talk meanwhile. Yours stands in the form; theirs says:
        </p>
        <ul className="my-2 list-disc pl-5">
          {differences(form.getValues(), conflict).map(({ field, theirs }) => (
            <li key={field}>
              {field}: <span className="whitespace-pre-line">{theirs}</span>
            </li>
          ))}
        </ul>
        <div className="flex flex-wrap gap-2">
          <Button onClick={keepMine}>Keep mine, then save over theirs</Button>
          <Button onClick={takeTheirs}>Take theirs</Button>
        </div>
      </Notice>
    </div>
  );
}
