import { useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { apiSend } from '../../../shared/api/client';
import { setUpKey } from './set-up';

export type Send = <T>(method: 'POST' | 'PUT' | 'PATCH', path: string, body?: unknown) => Promise<T>;

/** Has what shows any of the plant's set-up read again; settled when the set-up itself has been. */
export function useReadAgain(plantId: number): () => Promise<void> {
  const client = useQueryClient();
  return useCallback(async () => {
    await client.invalidateQueries({ queryKey: setUpKey(plantId) });
    for (const queryKey of [['plants', plantId, 'lines'], ['desk', plantId], ['lines'], ['channels']])
      void client.invalidateQueries({ queryKey });
  }, [client, plantId]);
}

/** Sends a change of the plant's set-up; what shows any of it is then read again, before the form closes. */
export function useSend(plantId: number): Send {
  const readAgain = useReadAgain(plantId);
  return useCallback(
    async <T>(method: 'POST' | 'PUT' | 'PATCH', path: string, body?: unknown) => {
      const answer = await apiSend<T>(method, path, body);
      await readAgain();
      return answer;
    },
    [readAgain],
  );
}
