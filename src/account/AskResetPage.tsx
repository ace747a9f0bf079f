import { useState } from 'react';
import { Link } from 'react-router-dom';
import { askPasswordReset } from '#shared/account/account.api.ts';
import { paths } from '../app/paths.ts';
import { call } from '../lib/call.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Outside } from './Outside.tsx';

export function AskResetPage() {
  const [sent, setSent] = useState(false);
  const form = useSendForm({
    schema: askPasswordReset.body,
    start: { email: '' },
    send: async (body) => {
      await call(askPasswordReset, { body });
      setSent(true);
    },
  });
  return (
    <Outside title="New password">
      {sent ? (
        <Notice kind="done">
          If this address has a sign-in, a link is on its way. It works for an hour.
        </Notice>
      ) : (
        <Form form={form} act="Send the link">
          <TextField
            label="E-mail"
            type="email"
            autoComplete="username"
            autoFocus
            {...form.register('email')}
            error={form.formState.errors.email?.message}
          />
        </Form>
      )}
      <p className="mt-6">
        <Link to={paths.signIn}>Back to sign in</Link>
      </p>
    </Outside>
  );
}
