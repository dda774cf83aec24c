import { apiBlob } from './client';

/** Fetches a file with the bearer token and hands it to the browser's downloads. */
export async function download(path: string, fallbackName: string): Promise<void> {
  const { blob, fileName } = await apiBlob(path);
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName ?? fallbackName;
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
