import { useQuery } from '@tanstack/react-query';
import { UserPlus } from 'lucide-react';
import { useState } from 'react';
import { toast } from 'sonner';
import { inviteBody, type Member } from '#shared/account/account.api.ts';
import { newId } from '#shared/kernel/ids.ts';
import { type Role, roleNames, roles } from '#shared/kernel/roles.ts';
import { wordsOf } from '../lib/query.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { peopleQuery } from '../people/people.queries.ts';
import { Button } from '../ui/Button.tsx';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { ConfirmDialog, Dialog } from '../ui/Dialog.tsx';
import { SelectField, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { membersQuery, useChangeRole, useInvite, useRemoveMember } from './members.queries.ts';

const roleChoices = roles.map((role) => ({ value: role, label: roleNames[role] }));

export function MembersPage() {
  const query = useQuery(membersQuery);
  const [inviting, setInviting] = useState(false);
  return (
    <Page
      title="Sign-ins"
      lead="Who can sign in, and as what. Workers need no sign-in to sign on at a site."
      actions={
        <Button kind="filled" icon={UserPlus} onClick={() => setInviting(true)}>
          Invite somebody
        </Button>
      }
    >
      <Loaded query={query}>
        {({ members }) => (
          <DataTable
            label="Sign-ins"
            rows={members}
            columns={columns}
            keyOf={({ accountId }) => accountId}
            empty="Nobody yet."
          />
        )}
      </Loaded>
      <Dialog title="Invite somebody" open={inviting} onClose={() => setInviting(false)}>
        {inviting ? <InviteForm onDone={() => setInviting(false)} /> : null}
      </Dialog>
    </Page>
  );
}

const columns: Column<Member>[] = [
  { title: 'Name', cell: ({ name }) => name },
  { title: 'E-mail', cell: ({ email }) => email, wide: true },
  { title: 'Role', cell: (member) => <RoleChooser member={member} /> },
  {
    title: 'State',
    cell: ({ joinedAt }) => (joinedAt ? 'Joined' : 'Invited, link not used yet'),
    wide: true,
  },
  { title: 'Remove', cell: (member) => <Remove member={member} /> },
];

function RoleChooser({ member }: { member: Member }) {
  const change = useChangeRole();
  const set = (role: Role) =>
    change.mutate({ id: member.accountId, role }, { onError: (error) => toast(wordsOf(error)) });
  return (
    <select
      aria-label={`Role of ${member.name}`}
      className="min-h-9 rounded border border-edge bg-sheet px-2"
      value={member.role}
      onChange={(event) => set(event.target.value as Role)}
    >
      {roleChoices.map(({ value, label }) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </select>
  );
}

function Remove({ member }: { member: Member }) {
  const [asking, setAsking] = useState(false);
  const remove = useRemoveMember();
  const go = () =>
    remove.mutate(member.accountId, {
      onError: (error) => toast(wordsOf(error)),
      onSettled: () => setAsking(false),
    });
  return (
    <>
      <Button kind="bare" onClick={() => setAsking(true)} aria-label={`Remove ${member.name}`}>
        Remove
      </Button>
      <ConfirmDialog
        destructive
        title={`Take away the sign-in of ${member.name}?`}
        lead="They can no longer open this organisation. What they wrote, issued and signed stays on record."
        act="Take it away"
        open={asking}
        busy={remove.isPending}
        onClose={() => setAsking(false)}
        onConfirm={go}
      />
    </>
  );
}

function InviteForm({ onDone }: { onDone: () => void }) {
  const invite = useInvite();
  const people = useQuery(peopleQuery({}));
  const [id] = useState(newId);
  const form = useSendForm({
    schema: inviteBody,
    start: { email: '', name: '', role: 'supervisor', personId: null },
    send: async (body) => {
      await invite.mutateAsync({ id, ...body });
      toast(`A link is on its way to ${body.email}.`);
      onDone();
    },
  });
  const { errors } = form.formState;
  return (
    <Form form={form} act="Send the invitation">
      <TextField label="Name" {...form.register('name')} error={errors.name?.message} />
      <TextField label="E-mail" type="email" {...form.register('email')} error={errors.email?.message} />
      <SelectField label="Role" choices={roleChoices} {...form.register('role')} />
      <SelectField
        label="Person on the crew list"
        help="So that this sign-in can sign on for itself."
        empty="Nobody"
        choices={(people.data?.people ?? []).map(({ id: value, name, employer }) => ({
          value,
          label: `${name}, ${employer}`,
        }))}
        {...form.register('personId', { setValueAs: (value: string | null) => value || null })}
      />
    </Form>
  );
}
