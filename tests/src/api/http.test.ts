import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { api, apiUrl, onSignedOut } from 'src/api/http.ts';
import { ApiProblem } from 'src/api/problem.ts';

const reply = (status: number, body: unknown) =>
  new Response(typeof body === 'string' ? body : JSON.stringify(body), { status });

const send = vi.fn<typeof fetch>();

beforeEach(() => {
  send.mockReset();
  vi.stubGlobal('fetch', send);
});

afterEach(() => {
  vi.unstubAllGlobals();
  onSignedOut(() => {});
});

const caught = (promise: Promise<unknown>) =>
  promise.then(
    () => Promise.reject(new Error('it was not refused')),
    (error: unknown) => error as ApiProblem,
  );

describe('api', () => {
  it('sends JSON under /api/v1 and reads the reply', async () => {
    send.mockResolvedValue(reply(200, { id: '7' }));
    expect(await api.put('/clubs/fen', { name: 'Fen' })).toEqual({ id: '7' });
    const [url, init] = send.mock.calls[0] ?? [];
    expect(url).toBe('/api/v1/clubs/fen');
    expect(init?.method).toBe('PUT');
    expect(init?.body).toBe('{"name":"Fen"}');
    expect(init?.headers).toMatchObject({ 'Content-Type': 'application/json' });
  });

  it('leaves the content type of a form with files to the browser', async () => {
    send.mockResolvedValue(reply(200, {}));
    await api.post('/uploads', new FormData());
    expect(send.mock.calls[0]?.[1]?.headers).not.toHaveProperty('Content-Type');
  });

  it('gives undefined for an empty reply', async () => {
    send.mockResolvedValue(new Response(null, { status: 204 }));
    expect(await api.del('/session')).toBeUndefined();
  });

  it('throws the problem document as it came', async () => {
    send.mockResolvedValue(
      reply(422, {
        status: 422,
        code: 'invalid',
        title: 'Some fields need another look',
        detail: 'Nothing was saved.',
        errors: { name: 'Write a name.' },
      }),
    );
    const problem = await caught(api.post('/clubs', {}));
    expect(problem).toBeInstanceOf(ApiProblem);
    expect(problem).toMatchObject({
      status: 422,
      code: 'invalid',
      detail: 'Nothing was saved.',
      errors: { name: 'Write a name.' },
    });
  });

  it('keeps the record that a stale write should have seen', async () => {
    send.mockResolvedValue(
      reply(409, { code: 'stale', title: 'Changed meanwhile', current: { version: 3 } }),
    );
    expect((await caught(api.put('/x', {}))).current).toEqual({ version: 3 });
  });

  it('makes a plain problem of a reply that is none', async () => {
    send.mockResolvedValue(reply(502, '<h1>Bad gateway</h1>'));
    expect(await caught(api.get('/session'))).toMatchObject({ status: 502, code: 'http_502' });
  });

  it('says that there is no connection when nothing comes back', async () => {
    send.mockRejectedValue(new TypeError('Failed to fetch'));
    expect(await caught(api.get('/session'))).toMatchObject({ status: 0, code: 'offline' });
  });

  it('tells the session when nobody is signed in, and not for a wrong password', async () => {
    const signedOut = vi.fn();
    onSignedOut(signedOut);
    send.mockResolvedValueOnce(reply(401, { code: 'wrong_password', title: 'Wrong' }));
    await caught(api.post('/session', {}));
    expect(signedOut).not.toHaveBeenCalled();
    send.mockResolvedValueOnce(reply(401, { code: 'signed_out', title: 'Signed out' }));
    await caught(api.get('/clubs'));
    expect(signedOut).toHaveBeenCalledOnce();
  });
});

describe('apiUrl', () => {
  it('leaves out what is not asked', () => {
    expect(apiUrl('/clubs/fen/audit', { from: '2026-01-01', who: undefined, page: 2 })).toBe(
      '/api/v1/clubs/fen/audit?from=2026-01-01&page=2',
    );
    expect(apiUrl('/session')).toBe('/api/v1/session');
  });
});
