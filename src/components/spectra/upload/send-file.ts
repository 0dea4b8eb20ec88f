import { readProblem, unreachable } from '#src/components/ui/problem-error.ts';

interface SendFileOptions {
  /** Share of the bytes that have left, 0 to 1; null once all have and the answer is awaited. */
  onProgress: (share: number | null) => void;
  signal: AbortSignal;
  idempotencyKey?: string;
}

/**
 * Sends a form with a file and tells how far it is.
 *
 * @throws {ProblemError} as `sendForm` of ui/http; an abort as `AbortError`
 */
export function sendFile<T>(url: string, form: FormData, options: SendFileOptions): Promise<T> {
  const { onProgress, signal, idempotencyKey } = options;
  return new Promise<T>((resolve, reject) => {
    const request = new XMLHttpRequest();
    const abort = () => request.abort();
    request.open('POST', url);
    request.setRequestHeader('accept', 'application/json');
    if (idempotencyKey) request.setRequestHeader('idempotency-key', idempotencyKey);
    request.upload.onprogress = ({ loaded, total, lengthComputable }) =>
      onProgress(lengthComputable && loaded < total ? loaded / total : null);
    request.onload = async () => {
      const headers = { 'content-type': request.getResponseHeader('content-type') ?? '' };
      const response = new Response(request.responseText, { status: request.status, headers });
      if (response.ok) resolve((await response.json()) as T);
      else reject(await readProblem(response));
    };
    request.onerror = () => reject(unreachable(new Error('the request failed')));
    request.onabort = () => reject(new DOMException('The upload was cancelled', 'AbortError'));
    request.onloadend = () => signal.removeEventListener('abort', abort);
    if (signal.aborted) return reject(new DOMException('The upload was cancelled', 'AbortError'));
    signal.addEventListener('abort', abort);
    request.send(form);
  });
}
