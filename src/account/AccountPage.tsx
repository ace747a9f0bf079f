import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { toast } from 'sonner';
import { changePassword, changePasswordBody, signOutEverywhere } from '#shared/account/account.api.ts';
import { roleNames } from '#shared/kernel/roles.ts';
import { paths } from '../app/paths.ts';
import { useSession } from '../app/session.queries.ts';
import { call } from '../lib/call.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { Button } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Page, Section } from '../ui/Page.tsx';

export function AccountPage() {
  const { account, role, organisation } = useSession();
  return (
    <Page
      title="Account"
      lead={`${account.name}, ${roleNames[role].toLowerCase()} at ${organisation.name}. ${account.email}`}
    >
      <Section title="Password">
        <PasswordForm />
      </Section>
      <Section title="Sessions">
        <Everywhere />
      </Section>
    </Page>
  );
}

function PasswordForm() {
  const form = useSendForm({
    schema: changePasswordBody,
    start: { current: '', password: '' },
    send: async (body) => {
      await call(changePassword, { body });
      form.reset();
      toast('Password changed. Your other sessions have ended.');
    },
  });
  const { errors } = form.formState;
  return (
    <div className="max-w-md">
      <Form form={form} act="Change the password">
        <TextField
          label="Current password"
          type="password"
          autoComplete="current-password"
          {...form.register('current')}
          error={errors.current?.message}
        />
        <TextField
          label="New password"
          help="12 characters or more."
          type="password"
          autoComplete="new-password"
          {...form.register('password')}
          error={errors.password?.message}
        />
      </Form>
    </div>
  );
}

function Everywhere() {
  const [asking, setAsking] = useState(false);
  const client = useQueryClient();
  const navigate = useNavigate();
  async function leave() {
    await call(signOutEverywhere, { body: {} });
    client.clear();
    await navigate(paths.signIn);
  }
  return (
    <>
      <p className="mb-3">
        A phone or a computer lost, or signed in where you should not be? End every session of this account at
        once.
      </p>
      <Button onClick={() => setAsking(true)}>Sign out everywhere</Button>
      <ConfirmDialog
        title="Sign out everywhere?"
        lead="Every session of this account ends, this one too. Drafts that are saved stay saved."
        act="Sign out everywhere"
        open={asking}
        onClose={() => setAsking(false)}
        onConfirm={() => void leave()}
      />
    </>
  );
}
