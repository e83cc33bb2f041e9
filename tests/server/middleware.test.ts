import type { APIContext } from 'astro';
import { beforeAll, describe, expect, it } from 'vitest';
import { hashPassword } from '../../src/auth/passwords';
import { createSessions } from '../../src/auth/sessions';
import { problemSchema } from '../../src/contract/problem';
import type { Role } from '../../src/contract/role';
import { createLiveHub } from '../../src/live/hub';
import { onRequest } from '../../src/middleware';
import { POST as signInEndpoint } from '../../src/pages/api/sign-in';
import { POST as signOutEndpoint } from '../../src/pages/api/sign-out';
import { openSite } from '../../src/server/site';
import { webSettings } from '../../src/settings';
import { createStore, type Store } from '../../src/store/client';
import { insertUser } from '../../src/store/people';
import { testStore } from '../database';

const PUBLIC_URL = 'http://localhost:8720';
const PASSWORD = 'four unrelated words';
const NOW = Date.UTC(2026, 2, 1, 10);
const cookies = new Map<Role, string>();

function siteOver(store: Store): void {
  const settings = webSettings({
    DATABASE_URL: 'mysql://nobody@127.0.0.1:1/none',
    BROKER_URL: 'mqtt://127.0.0.1:1',
    PUBLIC_URL,
  });
  openSite({ settings, store, live: createLiveHub(() => NOW), now: () => NOW });
}

let store: Store;
beforeAll(async () => {
  store = await testStore();
  siteOver(store);
  const sessions = createSessions({ store, publicUrl: PUBLIC_URL });
  const passwordHash = await hashPassword(PASSWORD);
  for (const role of ['operator', 'engineer', 'planner', 'admin'] as const) {
    const person = { email: `${role}@example.org`, name: role, role, passwordHash, createdAt: new Date(NOW) };
    const { name, value } = await sessions.open(await insertUser(store, person));
    cookies.set(role, `${name}=${value}`);
  }
});

interface Sent {
  readonly method?: string;
  readonly as?: Role;
  readonly headers?: Record<string, string>;
  readonly body?: string;
}
type Route = (context: APIContext) => Promise<Response>;
const page: Route = async () => new Response('<p>page</p>', { headers: { 'content-type': 'text/html' } });

/** Sends a request through the middleware to a route of that pattern. */
async function send(path: string, pattern: string, sent: Sent & { route?: Route } = {}): Promise<Response> {
  const url = new URL(path, PUBLIC_URL);
  const cookie = sent.as === undefined ? undefined : cookies.get(sent.as);
  const request = new Request(url, {
    method: sent.method ?? 'GET',
    headers: { ...(cookie === undefined ? {} : { cookie }), ...sent.headers },
    ...(sent.body === undefined ? {} : { body: sent.body }),
  });
  // what of Astro's context the middleware and the endpoints use
  const context = {
    request,
    url,
    routePattern: pattern,
    locals: {},
    clientAddress: '192.0.2.10',
    cookies: { set: () => undefined },
    redirect: (to: string, status: number) => new Response(null, { status, headers: { location: to } }),
  } as unknown as APIContext;
  const response = await onRequest(context, () => (sent.route ?? page)(context));
  return response as Response;
}
const problemIn = async (response: Response) => problemSchema.parse(await response.json()).problem;

describe('whoever is signed out', () => {
  it('is sent to sign in, and back to the page asked for', async () => {
    const response = await send('/lines/a?window=day', '/lines/[key]');
    expect(response.status).toBe(303);
    expect(response.headers.get('location')).toBe('/sign-in?next=%2Flines%2Fa%3Fwindow%3Dday');
  });
  it('gets 401 in JSON from every endpoint, those that do not exist among them', async () => {
    for (const [path, pattern] of [
      ['/api/lines', '/api/lines'],
      ['/api/nope', '/404'],
    ] as const) {
      const response = await send(path, pattern);
      expect(response.status).toBe(401);
      expect(await problemIn(response)).toBe('Sign in first.');
    }
  });
  it('reaches the sign-in page, with its own forms and no others', async () => {
    expect((await send('/sign-in', '/sign-in')).status).toBe(200);
    expect((await send('/sign-in?_action=signIn', '/sign-in', { method: 'POST' })).status).toBe(200);
    expect((await send('/sign-in?_action=addLine', '/sign-in', { method: 'POST' })).status).toBe(303);
  });
  it('cannot call an action by its own address', async () => {
    expect((await send('/_actions/signIn', '/_actions/[...path]', { method: 'POST' })).status).toBe(303);
  });
});

describe('whoever is signed in', () => {
  it('reaches what the role may', async () => {
    expect((await send('/', '/', { as: 'planner' })).status).toBe(200);
    expect((await send('/register', '/register', { as: 'engineer' })).status).toBe(200);
    expect((await send('/feeds', '/feeds', { as: 'admin' })).status).toBe(200);
  });
  it('gets a plain 403 page where the role may not', async () => {
    const response = await send('/feeds', '/feeds', { as: 'operator' });
    expect(response.status).toBe(403);
    expect(response.headers.get('content-type')).toContain('text/html');
    expect(await response.text()).toContain('Your role, operator, may not see feeds.');
  });
  it('gets 403 in JSON from an endpoint where the role may not', async () => {
    const response = await send('/api/register/lines', '/api/register/lines', { as: 'planner' });
    expect(response.status).toBe(403);
    expect(await problemIn(response)).toBe('Your role, planner, may not see the register.');
  });
  it('gets 404 in JSON from an endpoint that does not exist, and 405 for a method that does not', async () => {
    expect((await send('/api/nope', '/404', { as: 'admin' })).status).toBe(404);
    const response = await send('/api/lines', '/api/lines', { as: 'admin', method: 'DELETE' });
    expect(response.status).toBe(405);
    expect(response.headers.get('allow')).toBe('GET, HEAD');
  });
});

describe('a request from another site’s page', () => {
  it('is refused before anything is done, cookie or not', async () => {
    let reached = false;
    const response = await send('/api/warnings/1/acknowledge', '/api/warnings/[id]/acknowledge', {
      method: 'POST',
      as: 'operator',
      headers: { origin: 'https://elsewhere.example' },
      route: async () => {
        reached = true;
        return new Response();
      },
    });
    expect(response.status).toBe(403);
    expect(reached).toBe(false);
  });
});

describe('every answer', () => {
  it.each([
    ['a page', '/', '/'],
    ['an endpoint', '/api/lines', '/api/lines'],
    ['a refusal', '/feeds', '/feeds'],
  ])('carries the security headers and is not stored: %s', async (_what, path, pattern) => {
    const { headers } = await send(path, pattern, { as: 'operator' });
    expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'");
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('cache-control')).toBe('no-store');
  });
});

describe('a database that is away', () => {
  it('gives pages a sentence and programs JSON, both with when to try again', async () => {
    const away = createStore('mysql://nobody@127.0.0.1:1/none');
    siteOver(away);
    try {
      const asPage = await send('/', '/', { as: 'operator' });
      expect(asPage.status).toBe(503);
      expect(asPage.headers.get('refresh')).toBe('5');
      const text = await asPage.text();
      expect(text).toContain('Tareline cannot reach its database.');
      expect(text).not.toContain('ECONNREFUSED');
      const asJson = await send('/api/lines', '/api/lines', { as: 'operator' });
      expect(asJson.status).toBe(503);
      expect(asJson.headers.get('retry-after')).toBe('5');
    } finally {
      siteOver(store);
      await away.close();
    }
    expect((await send('/', '/', { as: 'operator' })).status).toBe(200);
  });
});

describe('the endpoints of signing in and out', () => {
  const post = (path: string, route: Route, sent: Sent = {}) =>
    send(path, path, {
      method: 'POST',
      route,
      ...sent,
      headers: { 'content-type': 'application/json', ...sent.headers },
    });
  const signIn = (body: unknown) =>
    post('/api/sign-in', signInEndpoint as Route, {
      body: typeof body === 'string' ? body : JSON.stringify(body),
    });

  it('say who signed in and set the cookie', async () => {
    const response = await signIn({ email: ' Planner@Example.org ', password: PASSWORD });
    expect(response.status).toBe(200);
    expect(await response.json()).toMatchObject({
      person: { email: 'planner@example.org', role: 'planner' },
    });
    expect(response.headers.get('set-cookie')).toMatch(/^tareline=[\w-]{43}; HttpOnly; .*SameSite=Lax$/);
  });
  it('answer an unknown person and a wrong password alike', async () => {
    const answers = await Promise.all(
      ['nobody@example.org', 'planner@example.org'].map(async (email) => {
        const response = await signIn({ email, password: 'wrong' });
        return [response.status, await response.text(), response.headers.get('set-cookie')];
      }),
    );
    expect(answers[0]).toEqual(answers[1]);
    expect(answers[0]?.[0]).toBe(401);
  });
  it('answer the sixth failure with 429 and when to come back', async () => {
    for (let n = 0; n < 5; n += 1) await signIn({ email: 'admin@example.org', password: 'wrong' });
    const response = await signIn({ email: 'admin@example.org', password: PASSWORD });
    expect(response.status).toBe(429);
    expect(response.headers.get('retry-after')).toBe('30');
    expect(await problemIn(response)).toBe('Too many failed sign-ins. Try again in 30 seconds.');
  });
  it('name every field that is wrong', async () => {
    const response = await signIn({ email: 'not an address' });
    expect(response.status).toBe(400);
    const { fields } = problemSchema.parse(await response.json());
    expect(fields).toEqual([
      { field: 'email', problem: 'This is not an e-mail address.' },
      { field: 'password', problem: 'Give your password.' },
    ]);
  });
  it('refuse a body that is not JSON', async () => {
    expect((await signIn('email=x')).status).toBe(400);
  });
  it('end the session at sign-out, and sign out twice without complaint', async () => {
    const signOut = () => post('/api/sign-out', signOutEndpoint as Route, { as: 'engineer' });
    const first = await signOut();
    expect(first.status).toBe(200);
    expect(first.headers.get('set-cookie')).toContain('Max-Age=0');
    expect((await send('/api/lines', '/api/lines', { as: 'engineer' })).status).toBe(401);
    expect((await signOut()).status).toBe(200);
  });
});
