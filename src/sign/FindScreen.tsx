import { useEffect, useState } from 'react';
import { findPerson } from '#shared/signons/signons.api.ts';
import type { ReplyOf } from '#shared/kernel/endpoint.ts';
import { call } from '../lib/call.ts';
import { DayCodeField } from './DayCodeField.tsx';
import { BigButton, inputClass, Labelled, Screen, Trouble } from './pieces.tsx';
import { useSending } from './useSending.ts';
import { fieldTroubles } from './field-troubles.ts';
import { useWait, waitWords } from './useWait.ts';

export type Found = ReplyOf<typeof findPerson> & { name: string; dayCode: string };

/** Find yourself by name, with the day code. Nobody is shown a list of names. */
export function FindScreen({
  token,
  start,
  onFound,
}: {
  token: string;
  /** What was typed before, when somebody comes back. */
  start: { name: string; dayCode: string };
  onFound: (found: Found) => void;
}) {
  const [name, setName] = useState(start.name);
  const [dayCode, setDayCode] = useState(start.dayCode);
  const [asked, setAsked] = useState(false);
  const { busy, trouble, send } = useSending();
  const wait = useWait(trouble);
  const nameTrouble = name.trim().length < 3 ? 'Write at least three letters of your name.' : null;
  const codeTrouble = /^\d{4}$/.test(dayCode) ? null : 'The day code is four digits.';
  const refused = fieldTroubles(trouble, wait);
  useEffect(() => {
    if (trouble) document.getElementById('day-code')?.focus();
  }, [trouble]);
  const find = () => {
    setAsked(true);
    if (nameTrouble || codeTrouble) document.getElementById(nameTrouble ? 'name' : 'day-code')?.focus();
    if (nameTrouble || codeTrouble || wait > 0) return;
    send(async () => {
      const found = await call(findPerson, { params: { token }, body: { dayCode, name: name.trim() } });
      onFound({ ...found, name: name.trim(), dayCode });
    });
  };
  return (
    <form
      noValidate
      className="flex grow flex-col"
      onSubmit={(event) => {
        event.preventDefault();
        find();
      }}
    >
      <Screen
        title="Who are you?"
        actions={
          <BigButton type="submit" className="grow text-[1.125rem]" disabled={busy || wait > 0}>
            {busy ? 'Looking…' : wait > 0 ? `Wait ${waitWords(wait)}` : 'Find me'}
          </BigButton>
        }
      >
        <Labelled
          id="name"
          label="Your name"
          help="As your employer writes it, or the first letters of it."
          trouble={asked ? (nameTrouble ?? refused.name) : null}
        >
          <input
            id="name"
            className={inputClass}
            autoComplete="name"
            autoCapitalize="words"
            maxLength={120}
            required
            aria-describedby="name-help name-trouble"
            aria-invalid={asked && nameTrouble !== null}
            value={name}
            onChange={({ target }) => setName(target.value)}
          />
        </Labelled>
        <DayCodeField
          value={dayCode}
          onChange={setDayCode}
          trouble={asked ? (codeTrouble ?? refused.dayCode) : null}
        />
        <Trouble words={refused.whole} />
      </Screen>
    </form>
  );
}
