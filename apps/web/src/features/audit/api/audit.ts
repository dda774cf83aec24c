import type { AuditFilterChoices, AuditPage } from '@app/contracts';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { apiGet } from '../../../shared/api/client';
import { auditPath, type AuditFilters } from '../filters';

export function useAudit(plantId: number, timeZone: string, filters: AuditFilters) {
  const path = auditPath(plantId, timeZone, filters);
  return useQuery({
    queryKey: ['audit', path],
    queryFn: ({ signal }) => apiGet<AuditPage>(path, signal),
    placeholderData: keepPreviousData,
  });
}

/** What the filters may be set to. */
export function useAuditChoices(plantId: number) {
  return useQuery({
    queryKey: ['audit', plantId, 'choices'],
    queryFn: ({ signal }) => apiGet<AuditFilterChoices>(`/plants/${plantId}/audit/filters`, signal),
  });
}
