import { ProblemError, problemFrom, problemOffline } from './problem-error.ts';

/** The only place that speaks to the server. Refusals come back as {@link ProblemError}, whatever went wrong. */
export async function readJson<T>(path: string, signal?: AbortSignal): Promise<T> {
  return bodyOf<T>(await ask(path, { headers: { accept: 'application/json' }, ...(signal ? { signal } : {}) }));
}

export async function postJson<T>(path: string, body: unknown, signal?: AbortSignal): Promise<T> {
  const headers = { accept: 'application/json', 'content-type': 'application/json' };
  const init = { method: 'POST', headers, body: JSON.stringify(body), ...(signal ? { signal } : {}) };
  return bodyOf<T>(await ask(path, init));
}

/** Sends a file's own bytes, as they are, under its name. */
export async function postBytes<T>(path: string, bytes: Blob): Promise<T> {
  const headers = { accept: 'application/json', 'content-type': 'application/octet-stream' };
  return bodyOf<T>(await ask(path, { method: 'POST', headers, body: bytes }));
}

/** Sends a table. */
export async function postTable<T>(path: string, table: Blob): Promise<T> {
  const headers = { accept: 'application/json', 'content-type': 'text/csv' };
  return bodyOf<T>(await ask(path, { method: 'POST', headers, body: table }));
}

/** Asks for a picture, for whether there is one. */
export async function readPicture(path: string): Promise<void> {
  await ask(path, {});
}

async function ask(path: string, init: RequestInit): Promise<Response> {
  let response: Response;
  try {
    response = await fetch(path, init);
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause;
    throw problemOffline(cause);
  }
  if (!response.ok) throw await problemFrom(response);
  return response;
}

async function bodyOf<T>(response: Response): Promise<T> {
  if (response.status === 204) return undefined as T;
  return (await response.json()) as T;
}

export function isAborted(error: unknown): boolean {
  return error instanceof DOMException && error.name === 'AbortError';
}

export function asProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  throw error;
}
