import type { IntakeProgress } from '@app/contracts';
import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { apiEvents } from '../../../shared/api/client';

/** The newest event of an intake's stream while it moves; everything on the screen is asked for again at its end. */
export function useIntakeProgress(intakeId: number, isOn: boolean): IntakeProgress | null {
  const client = useQueryClient();
  const [progress, setProgress] = useState<IntakeProgress | null>(null);
  useEffect(() => {
    if (!isOn) return;
    const listening = new AbortController();
    const onEvent = (event: IntakeProgress) => {
      setProgress(event);
      if (!['read', 'done', 'failed'].includes(event.stage)) return;
      listening.abort();
      void client.invalidateQueries();
    };
    // Without a stream the page still finds the end by asking.
    apiEvents<IntakeProgress>(`/intakes/${intakeId}/events`, onEvent, listening.signal).catch(() => undefined);
    return () => {
      listening.abort();
      setProgress(null);
    };
  }, [client, intakeId, isOn]);
  return isOn ? progress : null;
}
