import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/account/account.api.ts';
import type { Role } from '#shared/kernel/roles.ts';
import { call } from '../lib/call.ts';

export const membersQuery = queryOptions({ queryKey: ['members'], queryFn: () => call(api.listMembers, {}) });

function useMembersChange<Input, Reply>(send: (input: Input) => Promise<Reply>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: () => client.invalidateQueries({ queryKey: ['members'] }),
  });
}

export const useInvite = () =>
  useMembersChange(({ id, ...body }: z.output<typeof api.inviteBody> & { id: string }) =>
    call(api.inviteMember, { params: { id }, body }),
  );
export const useChangeRole = () =>
  useMembersChange(({ id, role }: { id: string; role: Role }) =>
    call(api.changeMemberRole, { params: { id }, body: { role } }),
  );
export const useRemoveMember = () =>
  useMembersChange((id: string) => call(api.removeMember, { params: { id } }));
