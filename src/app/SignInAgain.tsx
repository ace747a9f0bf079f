import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { signIn } from '#shared/account/account.api.ts';
import { call, signInAgain } from '../lib/call.ts';
import { wordsOf } from '../lib/query.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { TextField } from '../ui/Field.tsx';
import { sessionQuery, useSession } from './session.queries.ts';

/**
 * Stands over the page when the session has ended in the middle of work. Whatever waited for the server waits on, and goes through
 * after the password; nothing that was typed is lost.
 */
export function SignInAgain() {
  const { account, organisation } = useSession();
  const client = useQueryClient();
  const [waiting, setWaiting] = useState<(() => void)[]>([]);
  const [password, setPassword] = useState('');
  const [trouble, setTrouble] = useState('');
  const [busy, setBusy] = useState(false);
  useEffect(() => {
    signInAgain.wait = () => new Promise<void>((resolve) => setWaiting((others) => [...others, resolve]));
    return () => {
      signInAgain.wait = null;
    };
  }, []);

  async function goOn() {
    setBusy(true);
    setTrouble('');
    try {
      const session = await call(signIn, {
        body: { email: account.email, password, orgId: organisation.id },
      });
      client.setQueryData(sessionQuery.queryKey, session);
      setPassword('');
      for (const resolve of waiting) resolve();
      setWaiting([]);
    } catch (error) {
      setTrouble(wordsOf(error));
    } finally {
      setBusy(false);
    }
  }

  return (
    <Dialog
      firm
      title="Sign in to go on"
      lead="Your session has ended. What you wrote is still here and is saved as soon as you have signed in."
      open={waiting.length > 0}
      onClose={() => undefined}
    >
      <form
        className="flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          void goOn();
        }}
      >
        <p>{account.email}</p>
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          value={password}
          onChange={(event) => setPassword(event.target.value)}
          error={trouble || undefined}
        />
        <Button kind="filled" type="submit" busy={busy}>
          Sign in
        </Button>
      </form>
    </Dialog>
  );
}
