import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { newId } from '#shared/kernel/ids.ts';
import { personBody } from '#shared/people/people.api.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { employersQuery, peopleQuery, useSavePerson } from '../people/people.queries.ts';
import { useSetCrewMember } from '../sites/sites.queries.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { SelectField, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Notice } from '../ui/Notice.tsx';

type Chosen = { personId: string; name: string };

/** Somebody who is not on the crew: found among the people of the organisation, or added. */
export function AddSigner({
  siteId,
  open,
  onClose,
  onChosen,
}: {
  siteId: string;
  open: boolean;
  onClose: () => void;
  onChosen: (chosen: Chosen) => void;
}) {
  const [adding, setAdding] = useState(false);
  const close = () => {
    setAdding(false);
    onClose();
  };
  return (
    <Dialog title={adding ? 'Add a person' : 'Who signs?'} open={open} onClose={close}>
      {adding ? (
        <NewSigner siteId={siteId} onChosen={onChosen} onBack={() => setAdding(false)} />
      ) : (
        <FindSigner siteId={siteId} onChosen={onChosen} onNew={() => setAdding(true)} />
      )}
    </Dialog>
  );
}

function FindSigner({
  siteId,
  onChosen,
  onNew,
}: {
  siteId: string;
  onChosen: (chosen: Chosen) => void;
  onNew: () => void;
}) {
  const mayDo = useMayDo();
  const [search, setSearch] = useState('');
  const { data } = useQuery({ ...peopleQuery({ search }), enabled: search.trim().length > 1 });
  const setCrewMember = useSetCrewMember(siteId);
  const choose = async ({ id, name }: { id: string; name: string }) => {
    // Who may not change crews need not: signing puts the person on it.
    if (mayDo('site.manage')) await setCrewMember.mutateAsync({ personId: id, onCrew: true });
    onChosen({ personId: id, name });
  };
  return (
    <>
      <TextField
        label="Name"
        type="search"
        autoComplete="off"
        help="Two letters or more of the name."
        value={search}
        onChange={({ target }) => setSearch(target.value)}
      />
      <ul aria-live="polite" className="flex flex-col gap-1">
        {search.trim().length > 1 &&
          (data?.people ?? []).slice(0, 8).map((person) => (
            <li key={person.id}>
              <Button
                className="w-full justify-start text-left"
                onClick={() => void choose(person).catch(() => undefined)}
              >
                {person.name}, {person.employer}
              </Button>
            </li>
          ))}
        {data?.people.length === 0 ? <li className="text-ink-soft">Nobody has such a name.</li> : null}
      </ul>
      {setCrewMember.error ? <Notice kind="stop">{setCrewMember.error.message}</Notice> : null}
      {mayDo('person.manage') ? <Button onClick={onNew}>Add a new person</Button> : null}
    </>
  );
}

function NewSigner({
  siteId,
  onChosen,
  onBack,
}: {
  siteId: string;
  onChosen: (chosen: Chosen) => void;
  onBack: () => void;
}) {
  const [id] = useState(newId);
  const employers = useQuery(employersQuery);
  const save = useSavePerson(id);
  const setCrewMember = useSetCrewMember(siteId);
  const form = useSendForm({
    schema: personBody,
    start: { name: '', employerId: '', trade: '', contact: '', inductionCard: '', language: 'en' },
    send: async (body) => {
      await save.mutateAsync(body);
      await setCrewMember.mutateAsync({ personId: id, onCrew: true });
      onChosen({ personId: id, name: body.name });
    },
  });
  const { errors } = form.formState;
  return (
    <Form form={form} act="Add and sign" extra={<Button onClick={onBack}>Back</Button>}>
      <TextField label="Name" autoComplete="off" {...form.register('name')} error={errors.name?.message} />
      <SelectField
        label="Employer"
        empty="Choose"
        choices={(employers.data?.employers ?? []).map(({ id: value, name }) => ({ value, label: name }))}
        {...form.register('employerId')}
        error={errors.employerId ? 'Choose an employer.' : undefined}
      />
      <TextField label="Trade" {...form.register('trade')} error={errors.trade?.message} />
      <TextField
        label="Construction induction card"
        help="May stay empty."
        {...form.register('inductionCard')}
        error={errors.inductionCard?.message}
      />
    </Form>
  );
}
