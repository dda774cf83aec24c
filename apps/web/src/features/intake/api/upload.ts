import type { IntakeView, ProblemBody } from '@app/contracts';
import { ApiProblem } from '../../../shared/api/client';
import { currentToken, refreshToken } from '../../../shared/api/token';

/** What the server takes at most; a larger file is turned down before it is sent. */
export const LARGEST_FILE_BYTES = 30 * 1024 * 1024;

/** Sends a workbook for a line; `onSent` gets the share that has been sent. By XMLHttpRequest, since fetch does not tell. */
export async function uploadWorkbook(lineId: number, file: File, onSent: (share: number) => void): Promise<IntakeView> {
  const first = await send(lineId, file, onSent);
  if (first.status === 401 && (await refreshToken())) return answerOf(await send(lineId, file, onSent));
  return answerOf(first);
}

interface Answer {
  status: number;
  text: string;
}

function send(lineId: number, file: File, onSent: (share: number) => void): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', `/api/lines/${lineId}/intakes`);
    request.setRequestHeader('authorization', `Bearer ${currentToken() ?? ''}`);
    request.setRequestHeader('accept', 'application/json, application/problem+json');
    request.upload.onprogress = (event) => {
      if (event.lengthComputable) onSent(event.loaded / event.total);
    };
    request.onload = () => resolve({ status: request.status, text: request.responseText });
    request.onerror = () =>
      reject(
        new ApiProblem({
          status: 0,
          code: 'unreachable',
          detail: 'The upload broke off. Check the network, then try again.',
        }),
      );
    const form = new FormData();
    form.append('file', file, file.name);
    request.send(form);
  });
}

function answerOf({ status, text }: Answer): IntakeView {
  let body: unknown;
  try {
    body = JSON.parse(text);
  } catch {
    body = {};
  }
  if (status < 200 || status >= 300) {
    const title = status === 413 ? 'The file is too large.' : 'The upload was turned down.';
    throw new ApiProblem({ title, ...(body as Partial<ProblemBody>), status });
  }
  return body as IntakeView;
}
