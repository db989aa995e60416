import type { Role } from '@mereward/shared/accounts/contract';
import { AccountView } from '@mereward/shared/accounts/contract';
import {
  FisheryView,
  InvitationView,
  PeopleView,
  type ChangeFishery,
  type Invite,
  type MakeFishery,
} from '@mereward/shared/fisheries/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { useMutation, useQuery } from '@tanstack/react-query';
import { fisheryKeys } from '@/features/fisheries/api';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';
import { sessionStore } from '@/lib/session-store';

const peopleKey = (fisheryId: string) => [...fisheryKeys.one(fisheryId), 'people'] as const;

/** One fishery with everything it tells about itself. */
export const useFishery = (fisheryId: string) =>
  useQuery({
    queryKey: fisheryKeys.one(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}`, FisheryView, signal),
  });

/** Everybody with a role, and who is invited. Names and addresses of others are not kept on the device. */
export const usePeople = (fisheryId: string) =>
  useQuery({
    queryKey: peopleKey(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/people`, PeopleView, signal),
    meta: { keep: false },
  });

function kept(fishery: FisheryView): FisheryView {
  queryClient.setQueryData(fisheryKeys.one(fishery.id), fishery);
  void queryClient.invalidateQueries({ queryKey: fisheryKeys.all, exact: true });
  void queryClient.invalidateQueries({ queryKey: ['lakes'] });
  return fishery;
}

/** Makes a fishery; its maker is its owner from then on, so the account is read again with its new role. */
export async function makeFishery(input: MakeFishery): Promise<FisheryView> {
  const fishery = await api.post('/fisheries', input, FisheryView);
  sessionStore.update(await api.get('/accounts/me', AccountView));
  return kept(fishery);
}

export async function changeFishery(fisheryId: string, input: ChangeFishery): Promise<FisheryView> {
  try {
    return kept(await api.put(`/fisheries/${fisheryId}`, input, FisheryView));
  } catch (fault) {
    if (fault instanceof Problem && fault.kind === 'conflict')
      void queryClient.invalidateQueries({ queryKey: fisheryKeys.one(fisheryId), exact: true });
    throw fault;
  }
}

export async function invite(fisheryId: string, input: Invite): Promise<InvitationView> {
  const invitation = await api.post(`/fisheries/${fisheryId}/invitations`, input, InvitationView);
  void queryClient.invalidateQueries({ queryKey: peopleKey(fisheryId) });
  return invitation;
}

export const useWithdrawInvitation = (fisheryId: string) =>
  useMutation({
    mutationFn: (id: string) => api.del(`/fisheries/${fisheryId}/invitations/${id}`, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: peopleKey(fisheryId) }),
  });

/** Sets a person's whole list of roles. One's own may change with it, so the account is read again. */
export const useSetRoles = (fisheryId: string) =>
  useMutation({
    mutationFn: ({ accountId, roles }: { accountId: string; roles: readonly Role[] }) =>
      api.put(`/fisheries/${fisheryId}/people/${accountId}`, { roles }, PeopleView),
    onSuccess: async (people, { accountId }) => {
      queryClient.setQueryData(peopleKey(fisheryId), people);
      if (sessionStore.get().account?.id === accountId)
        sessionStore.update(await api.get('/accounts/me', AccountView));
    },
  });
