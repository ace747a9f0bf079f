import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { toast } from 'sonner';
import { newId } from '#shared/kernel/ids.ts';
import { type Employer, employerBody } from '#shared/people/people.api.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { employersQuery, useSaveEmployer } from './people.queries.ts';

type Editing = { id: string; employer: Employer | null };

export function EmployersPage() {
  const query = useQuery(employersQuery);
  const mayManage = useMayDo()('person.manage');
  const [editing, setEditing] = useState<Editing | null>(null);
  return (
    <Page
      title="Employers"
      lead="Whoever employs the people on your sites."
      actions={
        mayManage ? (
          <Button kind="filled" icon={Plus} onClick={() => setEditing({ id: newId(), employer: null })}>
            New employer
          </Button>
        ) : null
      }
    >
      <Loaded query={query}>
        {({ employers }) => (
          <DataTable
            label="Employers"
            rows={employers}
            keyOf={({ id }) => id}
            empty="No employer yet. Add the first one: every person belongs to one."
            columns={[
              { title: 'Name', cell: ({ name }) => name },
              { title: 'Contact', cell: ({ contact }) => contact, wide: true },
              {
                title: 'People',
                cell: ({ id, people }) => <Link to={`/people?employerId=${id}`}>{people}</Link>,
                numeric: true,
              },
              {
                title: 'Change',
                cell: (employer) =>
                  mayManage ? (
                    <Button
                      kind="bare"
                      aria-label={`Change ${employer.name}`}
                      onClick={() => setEditing({ id: employer.id, employer })}
                    >
                      Change
                    </Button>
                  ) : null,
              },
            ]}
          />
        )}
      </Loaded>
      <Dialog
        title={editing?.employer ? 'Change the employer' : 'New employer'}
        open={editing !== null}
        onClose={() => setEditing(null)}
      >
        {editing ? <EmployerForm {...editing} onDone={() => setEditing(null)} /> : null}
      </Dialog>
    </Page>
  );
}

function EmployerForm({ id, employer, onDone }: Editing & { onDone: () => void }) {
  const save = useSaveEmployer();
  const form = useSendForm({
    schema: employerBody,
    start: {
      name: employer?.name ?? '',
      businessNumber: employer?.businessNumber ?? '',
      contact: employer?.contact ?? '',
    },
    send: async (body) => {
      await save.mutateAsync({ id, ...body });
      toast(`Saved ${body.name}.`);
      onDone();
    },
  });
  const { errors } = form.formState;
  return (
    <Form form={form} act="Save">
      <TextField label="Name" {...form.register('name')} error={errors.name?.message} />
      <TextField
        label="Business number"
        {...form.register('businessNumber')}
        error={errors.businessNumber?.message}
      />
      <TextField label="Phone or e-mail" {...form.register('contact')} error={errors.contact?.message} />
    </Form>
  );
}
