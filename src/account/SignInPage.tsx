import { useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { signIn, signInBody } from '#shared/account/account.api.ts';
import { paths } from '../app/paths.ts';
import { sessionQuery } from '../app/session.queries.ts';
import { call } from '../lib/call.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Outside } from './Outside.tsx';

export function SignInPage() {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const form = useSendForm({
    schema: signInBody,
    start: { email: '', password: '' },
    send: async (body) => {
      const session = await call(signIn, { body });
      client.clear();
      client.setQueryData(sessionQuery.queryKey, session);
      await navigate(ownPath(search.get('to')), { replace: true });
    },
  });
  const { errors } = form.formState;
  return (
    <Outside title="Sign in">
      <Form
        form={form}
        act="Sign in"
        extra={
          <Link to={paths.askReset} className="self-center px-2">
            New password
          </Link>
        }
      >
        <TextField
          label="E-mail"
          type="email"
          autoComplete="username"
          autoFocus
          {...form.register('email')}
          error={errors.email?.message}
        />
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          {...form.register('password')}
          error={errors.password?.message}
        />
      </Form>
      <p className="mt-6 text-ink-soft">
        Here to sign on at a site? You need no account: scan the code on the site board.
      </p>
    </Outside>
  );
}

/** Only a path of our own may follow a sign-in. */
function ownPath(to: string | null): string {
  return to?.startsWith('/') && !to.startsWith('//') ? to : paths.home;
}
