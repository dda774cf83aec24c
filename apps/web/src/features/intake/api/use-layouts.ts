import type { LayoutView } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiList, apiSend } from '../../../shared/api/client';

const layoutsKey = (lineId: number) => ['lines', lineId, 'layouts'] as const;

export function useLayouts(lineId: number) {
  return useQuery({
    queryKey: layoutsKey(lineId),
    queryFn: ({ signal }) => apiList<LayoutView>(`/lines/${lineId}/layouts`, signal),
  });
}

export function useForgetLayout(lineId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (layoutId: number) => apiSend<void>('DELETE', `/lines/${lineId}/layouts/${layoutId}`),
    onSettled: () => client.invalidateQueries({ queryKey: layoutsKey(lineId) }),
  });
}
