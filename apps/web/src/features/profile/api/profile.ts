import type { PasswordRequest, ProfileRequest, SubscriptionsRequest, SubscriptionsView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiGet, apiSend } from '../../../shared/api/client';

const subscriptionsKey = (plantId: number) => ['me', 'subscriptions', plantId] as const;

export const changeProfile = (body: ProfileRequest) => apiSend<void>('PATCH', '/me', body);
export const changePassword = (body: PasswordRequest) => apiSend<void>('POST', '/me/password', body);
export const signOutEverywhere = () => apiSend<void>('POST', '/me/sign-out-everywhere');

export function useSubscriptions(plantId: number) {
  return useQuery({
    queryKey: subscriptionsKey(plantId),
    queryFn: ({ signal }) => apiGet<SubscriptionsView>(`/me/subscriptions/${plantId}`, signal),
  });
}

export function useChooseMail(plantId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SubscriptionsRequest) => apiSend<SubscriptionsView>('PUT', `/me/subscriptions/${plantId}`, body),
    onSuccess: (answer) => client.setQueryData(subscriptionsKey(plantId), answer),
  });
}
