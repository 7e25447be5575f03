import type { Outcome } from './errors';

/** Sends files of an import to the server and tells how many bytes are through. Every end is an outcome with words. */
export function sendFiles(
  about: { kind: string; operationId: string | null },
  files: readonly File[],
  onProgress: (sentBytes: number, totalBytes: number) => void,
): Promise<Outcome<{ uploadId: string }>> {
  const lost = {
    ok: false as const,
    problems: [{ message: 'The connection broke before the file was through. Nothing was kept. Try again.' }],
  };
  return new Promise((resolve) => {
    const query = new URLSearchParams({ kind: about.kind, ...(about.operationId ? { operation: about.operationId } : {}) });
    const request = new XMLHttpRequest();
    request.open('POST', `/api/v1/uploads?${query}`);
    request.responseType = 'json';
    request.upload.onprogress = (event) => onProgress(event.loaded, event.total);
    request.onerror = () => resolve(lost);
    request.onabort = () => resolve(lost);
    request.onload = () => resolve((request.response as Outcome<{ uploadId: string }> | null) ?? lost);
    const form = new FormData();
    for (const file of files) form.append('file', file, file.name);
    request.send(form);
  });
}
