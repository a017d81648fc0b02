import { fireEvent, render, screen, waitFor } from '@testing-library/vue';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import ResetPage from 'src/pages/accounts/ResetPage.vue';
import SignInPage from 'src/pages/accounts/SignInPage.vue';
import SignUpPage from 'src/pages/accounts/SignUpPage.vue';
import JoinPage from 'src/pages/clubs/JoinPage.vue';
import { accountsRoutes } from 'src/router/routes/accounts.ts';
import { clubsRoutes } from 'src/router/routes/clubs.ts';
import { useSessionStore } from 'src/stores/session.ts';

type Reply = { status?: number; body?: unknown };
let replies: Record<string, Reply>;
let calls: [string, unknown][];

const blank = { component: { render: () => null } };
function makeRouter() {
  return createRouter({
    history: createMemoryHistory(),
    routes: [...accountsRoutes, ...clubsRoutes]
      .map(({ path, name }) => ({ path, name: name ?? path, ...blank }))
      .concat([{ path: '/:all(.*)*', name: 'rest', ...blank }]),
  });
}

async function show(page: object, path: string, props: object = {}) {
  const router = makeRouter();
  await router.push(path);
  render(page, { props, global: { plugins: [router] } });
  return router;
}

const session = (email: string | null) => ({
  account: email ? { id: 'a', email, displayName: 'Noor' } : null,
  memberships: [],
  demo: false,
  firstRun: false,
});
const refused = (status: number, code: string, errors?: Record<string, string>): Reply => ({
  status,
  body: { status, code, title: 'Refused', detail: 'It was refused.', errors },
});

beforeEach(() => {
  setActivePinia(createPinia());
  calls = [];
  replies = {};
  vi.stubGlobal('fetch', async (url: string, init: RequestInit) => {
    const key = `${init.method} ${url.replace('/api/v1', '')}`;
    calls.push([key, init.body ? JSON.parse(String(init.body)) : undefined]);
    const { status = 200, body = {} } = replies[key] ?? refused(404, 'not_found');
    return new Response(JSON.stringify(body), { status });
  });
});
afterEach(() => vi.unstubAllGlobals());

const submit = (label: string) =>
  fireEvent.submit(screen.getByRole('button', { name: label }).closest('form') as HTMLFormElement);

describe('signing in', () => {
  it('goes on to the page that was asked for', async () => {
    replies['POST /session'] = { body: session('noor@quillmere.example') };
    replies['GET /session'] = { body: session('noor@quillmere.example') };
    const router = await show(SignInPage, '/sign-in?next=/c/quillmere/members');
    await fireEvent.update(screen.getByLabelText('E-mail address'), 'noor@quillmere.example');
    await fireEvent.update(
      screen.getByLabelText('Password', { selector: 'input' }),
      'rain on the roof',
    );
    await submit('Sign in');
    await waitFor(() => expect(router.currentRoute.value.fullPath).toBe('/c/quillmere/members'));
    expect(calls[0]).toEqual([
      'POST /session',
      { email: 'noor@quillmere.example', password: 'rain on the roof' },
    ]);
  });

  it("doesn't follow another site's address", async () => {
    replies['POST /session'] = { body: session('noor@quillmere.example') };
    replies['GET /session'] = { body: session('noor@quillmere.example') };
    const router = await show(SignInPage, '/sign-in?next=//elsewhere.example/');
    await submit('Sign in');
    await waitFor(() => expect(router.currentRoute.value.fullPath).toBe('/'));
  });

  it('says what was refused, and keeps what was typed', async () => {
    replies['POST /session'] = refused(401, 'wrong_password');
    await show(SignInPage, '/sign-in');
    await fireEvent.update(screen.getByLabelText('E-mail address'), 'noor@quillmere.example');
    await submit('Sign in');
    expect((await screen.findByRole('alert')).textContent).toContain('It was refused.');
    expect(screen.getByLabelText<HTMLInputElement>('E-mail address').value).toBe(
      'noor@quillmere.example',
    );
  });
});

describe('signing up', () => {
  it('shows a refusal beside its field, then leads to founding a club', async () => {
    replies['POST /accounts'] = refused(422, 'invalid', {
      password: 'Use at least 10 characters.',
    });
    const router = await show(SignUpPage, '/sign-up');
    await submit('Sign up');
    expect(await screen.findByText('Use at least 10 characters.')).toBeTruthy();
    replies['POST /accounts'] = { status: 201, body: session('noor@quillmere.example') };
    await submit('Sign up');
    await waitFor(() => expect(router.currentRoute.value.path).toBe('/clubs/new'));
    expect(useSessionStore().signedIn).toBe(true);
  });

  it('starts with the address of an invitation and goes back to it', async () => {
    replies['POST /accounts'] = { status: 201, body: session('fay@elsewhere.example') };
    const router = await show(
      SignUpPage,
      '/sign-up?next=/join/abc&email=fay@elsewhere.example&name=Fay',
    );
    expect(screen.getByLabelText<HTMLInputElement>('E-mail address').value).toBe(
      'fay@elsewhere.example',
    );
    await submit('Sign up');
    await waitFor(() => expect(router.currentRoute.value.path).toBe('/join/abc'));
  });
});

describe('a reset link', () => {
  it('that was used says so and offers a new one', async () => {
    replies['GET /resets/old'] = refused(409, 'token_spent');
    await show(ResetPage, '/reset/old', { token: 'old' });
    expect(await screen.findByText('This link no longer works')).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Send a new link' }).getAttribute('href')).toBe(
      '/reset',
    );
  });

  it('sets a password and signs in', async () => {
    replies['GET /resets/new'] = { body: { email: 'noor@quillmere.example' } };
    replies['POST /resets/new'] = { body: session('noor@quillmere.example') };
    const router = await show(ResetPage, '/reset/new', { token: 'new' });
    await fireEvent.update(await screen.findByLabelText('New password'), 'rain on the roof');
    await submit('Set the password');
    await waitFor(() => expect(router.currentRoute.value.path).toBe('/'));
    expect(calls.at(-1)).toEqual(['POST /resets/new', { password: 'rain on the roof' }]);
  });
});

describe('a join link', () => {
  const card = {
    club: { slug: 'quillmere', name: 'Quillmere', note: 'We grow.' },
    kind: 'link',
    email: null,
    name: '',
    invitedBy: 'Stig',
    needsApproval: true,
    expiresAt: '2026-12-15T00:00:00.000Z',
    already: null,
  };

  it('leads a stranger through sign-up and back', async () => {
    replies['GET /invitations/abc'] = { body: card };
    await show(JoinPage, '/join/abc', { token: 'abc' });
    const link = await screen.findByRole('link', { name: 'Sign up' });
    expect(link.getAttribute('href')).toBe('/sign-up?next=/join/abc');
  });

  it('asks for whoever is signed in, who then waits', async () => {
    useSessionStore().receive(session('noor@quillmere.example'));
    replies['GET /invitations/abc'] = { body: card };
    replies['POST /invitations/abc/accept'] = {
      body: { clubSlug: 'quillmere', clubName: 'Quillmere', status: 'pending' },
    };
    replies['GET /session'] = { body: session('noor@quillmere.example') };
    await show(JoinPage, '/join/abc', { token: 'abc' });
    await fireEvent.update(await screen.findByLabelText('Your name in Quillmere'), 'Noor V.');
    await submit('Ask to join');
    expect(await screen.findByText('Quillmere will let you in')).toBeTruthy();
    expect(calls).toContainEqual(['POST /invitations/abc/accept', { displayName: 'Noor V.' }]);
  });

  it('that has run out says so', async () => {
    replies['GET /invitations/old'] = refused(409, 'token_spent');
    await show(JoinPage, '/join/old', { token: 'old' });
    expect(await screen.findByText('This invitation no longer works')).toBeTruthy();
  });
});
