import { useEffect, useState } from 'react';
import { newId } from '#shared/kernel/ids.ts';
import { enrol } from '#shared/signons/signons.api.ts';
import { call } from '../lib/call.ts';
import { DayCodeField } from './DayCodeField.tsx';
import { fieldTroubles } from './field-troubles.ts';
import { BigButton, Screen, Trouble } from './pieces.tsx';
import { useSending } from './useSending.ts';
import { useWait, waitWords } from './useWait.ts';

/** A known phone at a site whose crew its person has not joined: the day code is all that is needed. */
export function JoinScreen({
  token,
  site,
  person,
  noticeVersion,
  footer,
  onJoined,
}: {
  token: string;
  site: string;
  person: { personId: string; name: string };
  noticeVersion: number;
  footer: React.ReactNode;
  onJoined: () => void;
}) {
  const [deviceId] = useState(newId);
  const [dayCode, setDayCode] = useState('');
  const [asked, setAsked] = useState(false);
  const { busy, trouble, send } = useSending();
  const wait = useWait(trouble);
  const refused = fieldTroubles(trouble, wait);
  const codeTrouble = /^\d{4}$/.test(dayCode) ? null : 'The day code is four digits.';
  useEffect(() => {
    if (trouble) document.getElementById('day-code')?.focus();
  }, [trouble]);
  const join = () => {
    setAsked(true);
    if (codeTrouble) document.getElementById('day-code')?.focus();
    if (codeTrouble || wait > 0) return;
    send(async () => {
      await call(enrol, {
        params: { token },
        body: { dayCode, deviceId, noticeVersion, person: { existing: person.personId } },
      });
      onJoined();
    });
  };
  return (
    <form
      noValidate
      className="flex grow flex-col"
      onSubmit={(event) => {
        event.preventDefault();
        join();
      }}
    >
      <Screen
        title={`${person.name}, join ${site}`}
        actions={
          <BigButton type="submit" className="grow text-[1.125rem]" disabled={busy || wait > 0}>
            {busy ? 'Joining…' : wait > 0 ? `Wait ${waitWords(wait)}` : 'Join the crew'}
          </BigButton>
        }
      >
        <p className="mb-4 text-[1.125rem]">This phone is known, but you are not on this site’s crew yet.</p>
        <DayCodeField
          value={dayCode}
          onChange={setDayCode}
          trouble={asked ? (codeTrouble ?? refused.dayCode) : null}
        />
        <Trouble words={refused.whole} />
        {footer}
      </Screen>
    </form>
  );
}
