/** A person of the demo who talks to one server process without a browser. */
export interface HttpClient {
  call(method: string, path: string, body?: unknown): Promise<Response>;
  json<T>(path: string): Promise<T>;
}

/** Signs a person of the demo in; `path`s start after /api/v1. */
export async function signInByHttp(url: string, email: string): Promise<HttpClient> {
  let cookie = '';
  const call = (method: string, path: string, body?: unknown) =>
    fetch(`${url}/api/v1${path}`, {
      method,
      headers: {
        cookie,
        origin: url,
        'sec-fetch-site': 'same-origin',
        'content-type': 'application/json',
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  const reply = await call('POST', '/session/demo', { email });
  if (!reply.ok) throw new Error(`sign-in as ${email}: ${reply.status}`);
  cookie = reply.headers.get('set-cookie')?.split(';')[0] ?? '';
  return { call, json: async <T>(path: string) => (await (await call('GET', path)).json()) as T };
}
