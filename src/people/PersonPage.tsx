import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { toast } from 'sonner';
import { newId } from '#shared/kernel/ids.ts';
import { languageNames, languages, type Person, personBody } from '#shared/people/people.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { wordsOf } from '../lib/query.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { Button } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { SelectField, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { employersQuery, personQuery, useArchivePerson, useSavePerson } from './people.queries.ts';

export function PersonPage() {
  const { id = 'new' } = useParams();
  return id === 'new' ? <NewPerson /> : <KnownPerson id={id} />;
}

function NewPerson() {
  const [id] = useState(newId);
  return (
    <Page title="New person">
      <PersonForm id={id} person={null} />
    </Page>
  );
}

function KnownPerson({ id }: { id: string }) {
  const query = useQuery(personQuery(id));
  const mayDo = useMayDo();
  return (
    <Loaded query={query}>
      {(person) => (
        <Page
          title={person.name}
          lead={`${person.trade}, ${person.employer}`}
          actions={mayDo('person.manage') ? <Archive person={person} /> : null}
        >
          {mayDo('person.manage') ? <PersonForm id={id} person={person} /> : null}
          <Section title="Sites">
            {person.sites.length === 0 ? (
              <p className="text-ink-soft">On no site’s crew.</p>
            ) : (
              <ul>
                {person.sites.map((site) => (
                  <li key={site.id}>
                    <Link to={paths.site(site.id)}>{site.name}</Link>
                  </li>
                ))}
              </ul>
            )}
            <p className="mt-3">
              <Link to={paths.registerOf({ search: person.name })}>What {person.name} has signed</Link>
            </p>
          </Section>
        </Page>
      )}
    </Loaded>
  );
}

function PersonForm({ id, person }: { id: string; person: Person | null }) {
  const employers = useQuery(employersQuery);
  const save = useSavePerson(id);
  const navigate = useNavigate();
  const form = useSendForm({
    schema: personBody,
    start: {
      name: person?.name ?? '',
      employerId: person?.employerId ?? '',
      trade: person?.trade ?? '',
      contact: person?.contact ?? '',
      inductionCard: person?.inductionCard ?? '',
      language: person?.language ?? 'en',
    },
    send: async (body) => {
      await save.mutateAsync(body);
      toast(`Saved ${body.name}.`);
      if (!person) await navigate(paths.person(id), { replace: true });
    },
  });
  const { errors } = form.formState;
  return (
    <Loaded query={employers}>
      {({ employers: choices }) => (
        <div className="max-w-md">
          <Form form={form} act="Save">
            <TextField
              label="Name"
              autoComplete="off"
              {...form.register('name')}
              error={errors.name?.message}
            />
            <SelectField
              label="Employer"
              empty="Choose"
              choices={choices.map(({ id: value, name }) => ({ value, label: name }))}
              {...form.register('employerId')}
              error={errors.employerId ? 'Choose an employer.' : undefined}
            />
            <TextField label="Trade" {...form.register('trade')} error={errors.trade?.message} />
            <TextField
              label="Phone or e-mail"
              {...form.register('contact')}
              error={errors.contact?.message}
            />
            <TextField
              label="Construction induction card"
              help="Number and state. The card itself has no expiry."
              {...form.register('inductionCard')}
              error={errors.inductionCard?.message}
            />
            <SelectField
              label="Language"
              choices={languages.map((value) => ({ value, label: languageNames[value] }))}
              {...form.register('language')}
            />
          </Form>
        </div>
      )}
    </Loaded>
  );
}

function Archive({ person }: { person: Person }) {
  const [asking, setAsking] = useState(false);
  const archive = useArchivePerson(person.id);
  const set = (archived: boolean) =>
    archive.mutate(archived, {
      onError: (error) => toast(wordsOf(error)),
      onSettled: () => setAsking(false),
    });
  if (person.archivedAt) return <Button onClick={() => set(false)}>Bring back</Button>;
  return (
    <>
      <Button kind="destructive" onClick={() => setAsking(true)}>
        Take off the list
      </Button>
      <ConfirmDialog
        destructive
        title={`Take ${person.name} off the list?`}
        lead="They leave every crew and their phone is no longer recognised. Everything they signed stays on record. You can bring them back."
        act="Take off the list"
        open={asking}
        busy={archive.isPending}
        onClose={() => setAsking(false)}
        onConfirm={() => set(true)}
      />
    </>
  );
}
