import type { SetUpWorkbookView } from '@app/contracts';
import { useCallback, useState } from 'react';
import { apiUpload, ApiProblem } from '../../../shared/api/client';
import { useReadAgain } from '../api/use-send';

/** What the server takes at most; a larger file is turned down before it is sent. */
const LARGEST_FILE_BYTES = 30 * 1024 * 1024;

export interface WorkbookState {
  file: File | null;
  view: SetUpWorkbookView | null;
  doing: 'nothing' | 'checking' | 'applying';
  error: unknown;
  check: (file: File) => Promise<void>;
  apply: () => Promise<void>;
  discard: () => void;
}

/** A workbook on its way into the set-up: first what it would do, then, when it is applied, what it did. */
export function useWorkbook(plantId: number): WorkbookState {
  const readAgain = useReadAgain(plantId);
  const [file, setFile] = useState<File | null>(null);
  const [view, setView] = useState<SetUpWorkbookView | null>(null);
  const [doing, setDoing] = useState<WorkbookState['doing']>('nothing');
  const [error, setError] = useState<unknown>(null);
  const send = useCallback(
    (sent: File, confirm: 'no' | 'yes') =>
      apiUpload<SetUpWorkbookView>(`/plants/${plantId}/set-up/workbook?confirm=${confirm}`, sent),
    [plantId],
  );

  const check = async (chosen: File) => {
    setFile(chosen);
    setView(null);
    setError(chosen.size > LARGEST_FILE_BYTES ? tooLarge(chosen) : null);
    if (chosen.size > LARGEST_FILE_BYTES) return;
    setDoing('checking');
    try {
      setView(await send(chosen, 'no'));
    } catch (failure) {
      setError(failure);
    }
    setDoing('nothing');
  };
  const apply = async () => {
    if (file === null) return;
    setDoing('applying');
    setError(null);
    try {
      setView(await send(file, 'yes'));
      await readAgain();
    } catch (failure) {
      // Something has changed since it was looked at: what is wrong now is said in its place.
      if (failure instanceof ApiProblem && failure.status === 422) await check(file);
      else setError(failure);
    }
    setDoing('nothing');
  };
  const discard = () => {
    setFile(null);
    setView(null);
    setError(null);
  };
  return { file, view, doing, error, check, apply, discard };
}

const tooLarge = (file: File) =>
  new ApiProblem({
    status: 413,
    code: 'file-too-large',
    detail: `${file.name} is larger than 30 MB, which no set-up is. Begin from a fresh download.`,
  });
