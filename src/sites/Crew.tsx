import { useQuery } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { toast } from 'sonner';
import type { Person } from '#shared/people/people.api.ts';
import type { Site } from '#shared/sites/sites.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { wordsOf } from '../lib/query.ts';
import { peopleQuery } from '../people/people.queries.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { inputLook } from '../ui/Field.tsx';
import { Section } from '../ui/Page.tsx';
import { useSetCrewMember } from './sites.queries.ts';

/** Who is expected to sign at the site. */
export function Crew({ site }: { site: Site & { people: Person[] } }) {
  const mayManage = useMayDo()('site.manage');
  const set = useSetCrewMember(site.id);
  const put = (personId: string, onCrew: boolean) =>
    set.mutate({ personId, onCrew }, { onError: (error) => toast(wordsOf(error)) });
  function takeOff(person: Person) {
    put(person.id, false);
    toast(`${person.name} is off the crew. What they signed stays.`, {
      action: { label: 'Undo', onClick: () => put(person.id, true) },
    });
  }
  return (
    <Section title={`Crew, ${site.people.length}`}>
      <DataTable
        label="Crew"
        rows={site.people}
        keyOf={({ id }) => id}
        linkOf={({ id }) => paths.person(id)}
        empty="Nobody yet. Put people on the crew here, or let them enrol themselves with the code above."
        columns={[
          { title: 'Name', cell: ({ name }) => name },
          { title: 'Employer', cell: ({ employer }) => employer },
          { title: 'Trade', cell: ({ trade }) => trade, wide: true },
          {
            title: 'Crew',
            cell: (person) =>
              mayManage ? (
                <Button
                  kind="bare"
                  aria-label={`Take ${person.name} off the crew`}
                  onClick={() => takeOff(person)}
                >
                  Take off
                </Button>
              ) : null,
          },
        ]}
      />
      {mayManage && !site.archivedAt ? <Add site={site} onAdd={(personId) => put(personId, true)} /> : null}
    </Section>
  );
}

function Add({ site, onAdd }: { site: Site & { people: Person[] }; onAdd: (personId: string) => void }) {
  const id = useId();
  const [personId, setPersonId] = useState('');
  const { data } = useQuery(peopleQuery({}));
  const others = (data?.people ?? []).filter(
    (person) => !site.people.some((member) => member.id === person.id),
  );
  return (
    <div className="mt-4 flex flex-wrap items-end gap-2">
      <div className="w-72 max-w-full">
        <label htmlFor={id} className="text-sm text-ink-soft">
          Put on the crew
        </label>
        <select
          id={id}
          className={inputLook}
          value={personId}
          onChange={(event) => setPersonId(event.target.value)}
        >
          <option value="">Choose a person</option>
          {others.map((person) => (
            <option key={person.id} value={person.id}>
              {person.name}, {person.employer}
            </option>
          ))}
        </select>
      </div>
      <Button
        disabled={!personId}
        onClick={() => {
          onAdd(personId);
          setPersonId('');
        }}
      >
        Put on
      </Button>
    </div>
  );
}
