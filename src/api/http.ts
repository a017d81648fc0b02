import { makeOfflineProblem, readProblem } from 'src/api/problem.ts';

const ROOT = '/api/v1';

type Query = Record<string, string | number | boolean | null | undefined>;
export type RequestOptions = { signal?: AbortSignal; headers?: Record<string, string> };

let whenSignedOut: () => void = () => {};

/** Named once, by the session: called whenever a reply says that nobody is signed in. */
export const onSignedOut = (handler: () => void) => {
  whenSignedOut = handler;
};

/** The address of an endpoint, for links, images and downloads. */
export function apiUrl(path: string, query: Query = {}): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== null && value !== '') search.set(name, String(value));
  }
  const text = search.toString();
  return ROOT + path + (text ? `?${text}` : '');
}

async function send<T>(
  method: string,
  url: string,
  body: unknown,
  options: RequestOptions = {},
): Promise<T> {
  const headers: Record<string, string> = { Accept: 'application/json', ...options.headers };
  const init: RequestInit = { method, headers, credentials: 'same-origin' };
  if (options.signal) init.signal = options.signal;
  if (body instanceof FormData) {
    init.body = body;
  } else if (body !== undefined) {
    headers['Content-Type'] = 'application/json';
    init.body = JSON.stringify(body);
  }

  let reply: Response;
  try {
    reply = await fetch(url, init);
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw makeOfflineProblem();
  }
  if (!reply.ok) {
    const problem = await readProblem(reply);
    if (problem.code === 'signed_out') whenSignedOut();
    throw problem;
  }
  const text = await reply.text();
  // An empty reply (204) is `undefined`, which the caller's `T` says.
  return (text ? JSON.parse(text) : undefined) as T;
}

/** The one way to the server: JSON in and out, a refusal as a thrown `ApiProblem`. */
export const api = {
  get: <T>(path: string, query?: Query, options?: RequestOptions) =>
    send<T>('GET', apiUrl(path, query), undefined, options),
  post: <T>(path: string, body?: unknown, options?: RequestOptions) =>
    send<T>('POST', apiUrl(path), body, options),
  put: <T>(path: string, body?: unknown, options?: RequestOptions) =>
    send<T>('PUT', apiUrl(path), body, options),
  patch: <T>(path: string, body?: unknown, options?: RequestOptions) =>
    send<T>('PATCH', apiUrl(path), body, options),
  del: <T>(path: string, body?: unknown, options?: RequestOptions) =>
    send<T>('DELETE', apiUrl(path), body, options),
};
