import { apiFetch } from './fetch';
import { ApiProblem } from './problem';

export { ApiProblem, asProblem } from './problem';
export { apiEvents } from './events';

type Method = 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Paths are below /api and begin with a slash: `apiGet<LotView>('/lots/12')`. */
export async function apiGet<T>(path: string, signal?: AbortSignal): Promise<T> {
  return readJson<T>(await apiFetch(path, { signal }));
}

/** The items of a list, whether the API answers a page of them or the bare list. */
export async function apiList<T>(path: string, signal?: AbortSignal): Promise<T[]> {
  const answer = await apiGet<T[] | { items: T[] }>(path, signal);
  return Array.isArray(answer) ? answer : answer.items;
}

export async function apiSend<T>(method: Method, path: string, body?: unknown): Promise<T> {
  const init: RequestInit = { method };
  if (body !== undefined) {
    init.body = JSON.stringify(body);
    init.headers = { 'content-type': 'application/json' };
  }
  return readJson<T>(await apiFetch(path, init));
}

/** Sends a file as the multipart field `file`. */
export async function apiUpload<T>(path: string, file: File, signal?: AbortSignal): Promise<T> {
  const form = new FormData();
  form.append('file', file, file.name);
  return readJson<T>(await apiFetch(path, { method: 'POST', body: form, signal }));
}

export interface NamedBlob {
  blob: Blob;
  /** As the server names it, if it does. */
  fileName: string | null;
}

export async function apiBlob(path: string, signal?: AbortSignal): Promise<NamedBlob> {
  const response = await apiFetch(path, { signal });
  return { blob: await response.blob(), fileName: fileNameOf(response.headers.get('content-disposition')) };
}

async function readJson<T>(response: Response): Promise<T> {
  if (response.status === 204) return undefined as T;
  const text = await response.text();
  if (text === '') return undefined as T;
  try {
    return JSON.parse(text) as T;
  } catch {
    throw new ApiProblem({
      status: response.status,
      code: 'not-json',
      detail: 'The server’s answer could not be read.',
    });
  }
}

/** The file name in a Content-Disposition header, the UTF-8 form first. */
export function fileNameOf(header: string | null): string | null {
  if (header === null) return null;
  const extended = /filename\*=(?:UTF-8'')?([^;]+)/i.exec(header);
  if (extended !== null) {
    try {
      return decodeURIComponent(extended[1].trim());
    } catch {
      // A malformed escape: the plain form below may still do.
    }
  }
  return /filename="?([^";]+)"?/i.exec(header)?.[1] ?? null;
}
