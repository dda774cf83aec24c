import type { PlanView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { Navigate, useParams } from 'react-router-dom';
import { apiGet } from '../shared/api/client';
import { Loaded } from '../shared/ui/loaded';
import { urls } from './urls';

/** A plan revision is read on its channel's page. */
export function PlanRedirect() {
  const { planId } = useParams();
  const query = useQuery({
    queryKey: ['plans', planId],
    queryFn: ({ signal }) => apiGet<PlanView>(`/plans/${planId}`, signal),
  });
  return (
    <Loaded query={query} failure="The plan could not be loaded.">
      {(plan) => <Navigate to={urls.plans(plan.channelId)} replace />}
    </Loaded>
  );
}
