import type { InvitationRequest, LineView, PersonView, RolesRequest } from '@app/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { apiList, apiSend } from '../../../shared/api/client';

const peopleKey = (plantId: number) => ['plants', plantId, 'people'] as const;

export function usePeople(plantId: number) {
  return useQuery({
    queryKey: peopleKey(plantId),
    queryFn: ({ signal }) => apiList<PersonView>(`/plants/${plantId}/people`, signal),
  });
}

export function usePlantLines(plantId: number) {
  return useQuery({
    queryKey: ['plants', plantId, 'people', 'lines'] as const,
    queryFn: ({ signal }) => apiList<LineView>(`/plants/${plantId}/lines`, signal),
  });
}

function usePeopleChange<T>(plantId: number, change: (input: T) => Promise<PersonView>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () => client.invalidateQueries({ queryKey: peopleKey(plantId) }),
  });
}

export const useInvite = (plantId: number) =>
  usePeopleChange(plantId, (body: InvitationRequest) => apiSend<PersonView>('POST', `/plants/${plantId}/people`, body));

export const useChangeRoles = (plantId: number, personId: number) =>
  usePeopleChange(plantId, (body: RolesRequest) =>
    apiSend<PersonView>('PATCH', `/plants/${plantId}/people/${personId}`, body),
  );

export const usePersonAction = (plantId: number, personId: number) =>
  usePeopleChange(plantId, (what: 'invitation' | 'disable' | 'enable') =>
    apiSend<PersonView>('POST', `/plants/${plantId}/people/${personId}/${what}`),
  );
