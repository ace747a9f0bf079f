import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { resetPassword, resetPasswordBody } from '#shared/account/account.api.ts';
import { paths } from '../app/paths.ts';
import { call } from '../lib/call.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Outside } from './Outside.tsx';

export function ResetPage() {
  const { token = '' } = useParams();
  const [done, setDone] = useState(false);
  const form = useSendForm({
    schema: resetPasswordBody,
    start: { token, password: '' },
    send: async (body) => {
      await call(resetPassword, { body });
      setDone(true);
    },
  });
  if (done) {
    return (
      <Outside title="Set a password">
        <Notice kind="done">Your password is set. Every open session has ended.</Notice>
        <p className="mt-4">
          <Link to={paths.signIn}>Sign in</Link>
        </p>
      </Outside>
    );
  }
  return (
    <Outside title="Set a password">
      <Form
        form={form}
        act="Set the password"
        extra={
          <Link to={paths.askReset} className="self-center px-2">
            Ask for another link
          </Link>
        }
      >
        <TextField
          label="Password"
          help="12 characters or more. A short sentence is easy to keep."
          type="password"
          autoComplete="new-password"
          autoFocus
          {...form.register('password')}
          error={form.formState.errors.password?.message}
        />
      </Form>
    </Outside>
  );
}
