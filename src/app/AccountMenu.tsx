import { useQueryClient } from '@tanstack/react-query';
import { LogOut, Mail, UserRound } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import { useNavigate } from 'react-router-dom';
import { chooseOrganisation, signOut } from '#shared/account/account.api.ts';
import { roleNames } from '#shared/kernel/roles.ts';
import { call } from '../lib/call.ts';
import { paths } from './paths.ts';
import { sessionQuery, useSession } from './session.queries.ts';

const item =
  'flex min-h-10 cursor-pointer items-center gap-2 rounded px-3 outline-none data-[highlighted]:bg-chalk-wash';

export function AccountMenu() {
  const session = useSession();
  const client = useQueryClient();
  const navigate = useNavigate();

  async function leave() {
    await call(signOut, {});
    client.clear();
    await navigate(paths.signIn);
  }

  async function open(orgId: string) {
    client.clear();
    client.setQueryData(sessionQuery.queryKey, await call(chooseOrganisation, { body: { orgId } }));
    await navigate(paths.home);
  }

  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger
        className="flex min-h-10 shrink-0 items-center gap-2 rounded border border-edge px-2.5 text-ink pointer-coarse:min-h-12"
        aria-label={`Account of ${session.account.name}`}
      >
        <UserRound size={18} strokeWidth={1.75} aria-hidden />
        <span className="hidden lg:inline">{session.account.name}</span>
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={4}
          className="z-50 min-w-56 rounded border border-zinc bg-sheet p-1 text-ink shadow-float"
        >
          <DropdownMenu.Label className="px-3 py-2 text-sm text-ink-soft">
            {session.account.name}, {roleNames[session.role].toLowerCase()}
          </DropdownMenu.Label>
          <DropdownMenu.Item className={item} onSelect={() => void navigate(paths.account)}>
            <UserRound size={18} strokeWidth={1.75} aria-hidden /> Account
          </DropdownMenu.Item>
          {session.outbox ? (
            <DropdownMenu.Item className={item} onSelect={() => void navigate(paths.outbox)}>
              <Mail size={18} strokeWidth={1.75} aria-hidden /> Development outbox
            </DropdownMenu.Item>
          ) : null}
          {session.memberships
            .filter(({ orgId }) => orgId !== session.organisation.id)
            .map(({ orgId, organisation }) => (
              <DropdownMenu.Item key={orgId} className={item} onSelect={() => void open(orgId)}>
                Open {organisation}
              </DropdownMenu.Item>
            ))}
          <DropdownMenu.Item className={item} onSelect={() => void leave()}>
            <LogOut size={18} strokeWidth={1.75} aria-hidden /> Sign out
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
