import { useState } from 'react';
import type { z } from 'zod';
import { newId } from '#shared/kernel/ids.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { languageNames, languages } from '#shared/people/people.api.ts';
import { newPersonSchema } from '#shared/signons/signons.api.ts';
import type { Found } from './FindScreen.tsx';
import { BigButton, inputClass, Labelled, Screen, Trouble } from './pieces.tsx';

export type NewPerson = z.output<typeof newPersonSchema>;

/** Enrol yourself, once: who you are, whom you work for, what you do. */
export function NewPersonScreen({
  found,
  busy,
  trouble,
  onEnrol,
  onBack,
}: {
  found: Found;
  busy: boolean;
  trouble: Error | null;
  onEnrol: (person: NewPerson) => void;
  onBack: () => void;
}) {
  const [person, setPerson] = useState<NewPerson>(() => ({
    id: newId(),
    name: found.name,
    employerId: '',
    trade: '',
    contact: '',
    inductionCard: '',
    language: 'en',
  }));
  const [asked, setAsked] = useState(false);
  const troubles = asked ? troublesOf(person, trouble) : {};
  const set = (changes: Partial<NewPerson>) => setPerson({ ...person, ...changes });
  const text = (field: 'name' | 'trade' | 'contact' | 'inductionCard', extra: object = {}) => ({
    id: field,
    className: inputClass,
    'aria-describedby': `${field}-trouble`,
    'aria-invalid': troubles[field] !== undefined,
    value: person[field],
    onChange: ({ target }: React.ChangeEvent<HTMLInputElement>) => set({ [field]: target.value }),
    ...extra,
  });
  const enrol = () => {
    setAsked(true);
    const parsed = newPersonSchema.safeParse(person);
    if (parsed.success) onEnrol(parsed.data);
    else document.getElementById(String(parsed.error.issues[0]?.path[0]))?.focus();
  };
  return (
    <form
      noValidate
      className="flex grow flex-col"
      onSubmit={(event) => {
        event.preventDefault();
        enrol();
      }}
    >
      <Screen
        title="Add yourself"
        actions={
          <>
            <BigButton kind="quiet" className="w-1/3" disabled={busy} onClick={onBack}>
              Back
            </BigButton>
            <BigButton type="submit" className="grow" disabled={busy}>
              {busy ? 'Adding…' : 'Add me'}
            </BigButton>
          </>
        }
      >
        <Labelled id="name" label="Your whole name" trouble={troubles.name ?? null}>
          <input {...text('name', { autoComplete: 'name', maxLength: 120 })} />
        </Labelled>
        <Labelled id="employerId" label="Who you work for" trouble={troubles.employerId ?? null}>
          <select
            id="employerId"
            className={inputClass}
            aria-describedby="employerId-trouble"
            value={person.employerId}
            onChange={({ target }) => set({ employerId: target.value })}
          >
            <option value="">Choose</option>
            {found.employers.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </select>
        </Labelled>
        <Labelled id="trade" label="Your trade" trouble={troubles.trade ?? null}>
          <input {...text('trade', { autoComplete: 'organization-title', maxLength: 80 })} />
        </Labelled>
        <Labelled id="contact" label="Phone or e-mail (may stay empty)" trouble={troubles.contact ?? null}>
          <input {...text('contact', { autoComplete: 'tel', maxLength: 120 })} />
        </Labelled>
        <Labelled
          id="inductionCard"
          label="Construction induction card number (may stay empty)"
          trouble={troubles.inductionCard ?? null}
        >
          <input {...text('inductionCard', { autoComplete: 'off', maxLength: 40 })} />
        </Labelled>
        <Labelled id="language" label="The language you read best">
          <select
            id="language"
            className={inputClass}
            value={person.language}
            onChange={({ target }) => set({ language: target.value as NewPerson['language'] })}
          >
            {languages.map((language) => (
              <option key={language} value={language}>
                {languageNames[language]}
              </option>
            ))}
          </select>
        </Labelled>
        <Trouble words={troubles.whole ?? null} />
      </Screen>
    </form>
  );
}

function troublesOf(person: NewPerson, refusal: Error | null): Record<string, string> {
  const parsed = newPersonSchema.safeParse(person);
  if (!parsed.success)
    return Object.fromEntries(
      parsed.error.issues.map(({ path, message }) => {
        const field = String(path[0]);
        return [field, field === 'employerId' ? 'Choose who you work for.' : message];
      }),
    );
  if (!refusal) return {};
  // The server names the field within the whole request: `person.new.trade`.
  const fields = refusal instanceof Refusal ? Object.entries(refusal.fields) : [];
  const own = fields.map(([path, words]) => [path.split('.').at(-1) ?? '', words] as const);
  return own.length > 0
    ? { ...Object.fromEntries(own), whole: own[0]?.[1] ?? '' }
    : { whole: refusal.message };
}
