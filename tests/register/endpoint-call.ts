import type { APIContext, APIRoute } from 'astro';
import type { Role } from '../../src/contract/role';
import type { Site } from '../../src/server/site';
import type { Store } from '../../src/store/client';

export const NOW_MS = Date.parse('2026-03-02T08:00:00Z');

export interface Sent {
  readonly role?: Role | undefined;
  readonly params?: Record<string, string>;
  readonly body?: unknown;
  readonly query?: string;
  readonly contentType?: string;
}

/** Calls an endpoint as the web process would, past the middleware: what it answers is its own doing. */
export async function answerOf(
  store: Store,
  endpoint: APIRoute,
  sent: Sent,
): Promise<{ status: number; body: unknown }> {
  const { role, params = {}, body, query = '', contentType = 'application/json' } = sent;
  const url = new URL(`https://tareline.example/api${query}`);
  const request = new Request(url, {
    method: body === undefined ? 'GET' : 'POST',
    headers: { 'content-type': contentType },
    body: body === undefined ? null : typeof body === 'string' ? body : JSON.stringify(body),
  });
  const person = role && { id: 'p1', email: 'mira@tareline.example', name: 'Mira Holt', role };
  const site = { store, now: () => NOW_MS } as unknown as Site;
  const context = { request, url, params, locals: { site, person } } as unknown as APIContext;
  const answer = (await endpoint(context)) as Response;
  return { status: answer.status, body: await answer.json() };
}
