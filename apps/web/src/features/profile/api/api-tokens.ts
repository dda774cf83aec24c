import type { ApiTokenRequest, ApiTokenView, NewApiToken } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiList, apiSend } from '../../../shared/api/client';

const tokensKey = (plantId: number) => ['plants', plantId, 'api-tokens'] as const;

export function useApiTokens(plantId: number) {
  return useQuery({
    queryKey: tokensKey(plantId),
    queryFn: ({ signal }) => apiList<ApiTokenView>(`/plants/${plantId}/api-tokens`, signal),
  });
}

/** What it answers holds the token itself: it stays with the caller, not among what is kept of the plant. */
export function useMakeApiToken(plantId: number) {
  const client = useQueryClient();
  return useMutation({
    gcTime: 0,
    mutationFn: (body: ApiTokenRequest) => apiSend<NewApiToken>('POST', `/plants/${plantId}/api-tokens`, body),
    onSettled: () => client.invalidateQueries({ queryKey: tokensKey(plantId) }),
  });
}

export function useRevokeApiToken(plantId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: number) => apiSend<void>('DELETE', `/plants/${plantId}/api-tokens/${id}`),
    onSettled: () => client.invalidateQueries({ queryKey: tokensKey(plantId) }),
  });
}
