import type { APIContext, MiddlewareHandler, MiddlewareNext } from 'astro';
import { may } from './auth/abilities';
import { roleSentence } from './auth/guard';
import type { Person } from './auth/person';
import { refusal } from './auth/refusal';
import { routeNeed, SIGNED_OUT_ACTIONS } from './auth/routes';
import { isForeign } from './auth/same-origin';
import { createSessions } from './auth/sessions';
import { inlineHashes } from './server/inline-hashes';
import { createOutage } from './server/outage';
import { plainPage } from './server/plain-page';
import { securityHeaders } from './server/security-headers';
import { currentSite } from './server/site';
import { databaseIsAway } from './store/database-away';

const development = import.meta.env.DEV;
const outage = createOutage((line) => console.warn(line));

export const onRequest: MiddlewareHandler = async (context, next) => {
  context.locals.site = currentSite();
  context.locals.person = undefined;
  return withHeaders(context, await answered(context, next));
};

/** Every way a request can end, as a whole answer: a page that fails halfway has not been sent yet. */
async function answered(context: APIContext, next: MiddlewareNext): Promise<Response> {
  const { request, locals } = context;
  const { PUBLIC_URL } = locals.site.settings;
  if (isForeign(request, PUBLIC_URL))
    return turnedAway(context, {
      status: 403,
      problem: `This request does not come from a page of ${new URL(PUBLIC_URL).origin}.`,
    });
  try {
    locals.person = await signedInPerson(context);
    const response = stopped(context, locals.person) ?? (await whole(await next()));
    // only a session that was read proves that the database answers
    if (locals.person !== undefined) outage.over();
    return response;
  } catch (error) {
    if (databaseIsAway(error)) return databaseAway(context);
    if (development) throw error;
    console.error(`${request.method} ${context.url.pathname} failed:`, error);
    return turnedAway(context, {
      status: 500,
      problem: 'Something went wrong here. It has been logged; trying again may help.',
    });
  }
}

async function signedInPerson(context: APIContext): Promise<Person | undefined> {
  const { store, settings } = context.locals.site;
  const sessions = createSessions({ store, publicUrl: settings.PUBLIC_URL });
  const session = await sessions.continued(context.request.headers.get('cookie'));
  const { renewed } = session ?? {};
  if (renewed !== undefined) context.cookies.set(renewed.name, renewed.value, renewed.attributes);
  return session?.person;
}

/** The answer to whoever may not go on to the route; undefined for those who may. */
function stopped(context: APIContext, person: Person | undefined): Response | undefined {
  const route = routeNeed(context.request.method, context.routePattern);
  if (route.kind === 'open' && route.need === 'nothing' && isForSignedOut(context)) return undefined;
  if (person === undefined) return signInFirst(context);
  if (route.kind === 'no such method')
    return turnedAway(context, {
      status: 405,
      problem: 'This address is not for that.',
      headers: { Allow: route.allowed.join(', ') },
    });
  if (route.kind === 'no such route' || route.need === 'nothing')
    return turnedAway(context, { status: 404, problem: 'There is nothing at this address.' });
  if (may(person.role, route.need)) return undefined;
  return turnedAway(context, { status: 403, problem: roleSentence(person, route.need) });
}

const isForPrograms = ({ url }: APIContext): boolean => url.pathname.startsWith('/api/');

function isForSignedOut(context: APIContext): boolean {
  const action = context.url.searchParams.get('_action');
  if (action !== null && !SIGNED_OUT_ACTIONS.includes(action)) return false;
  // an endpoint that does not exist tells so only to those who are signed in
  return !(context.routePattern === '/404' && isForPrograms(context));
}

function signInFirst(context: APIContext): Response {
  if (isForPrograms(context)) return refusal(401, 'Sign in first.');
  const { pathname, search } = context.url;
  const asked = ['GET', 'HEAD'].includes(context.request.method) ? `${pathname}${search}` : '/';
  return context.redirect(asked === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(asked)}`, 303);
}

const TITLES: Readonly<Record<number, string>> = {
  403: 'Not for you',
  404: 'Nothing here',
  405: 'Not possible here',
  500: 'Something went wrong',
  503: 'The database does not answer',
};

interface Answer {
  readonly status: number;
  readonly problem: string;
  readonly headers?: Record<string, string>;
}

function turnedAway(context: APIContext, { status, problem, headers = {} }: Answer): Response {
  if (isForPrograms(context)) return refusal(status, problem, { headers });
  const siteName = context.locals.site.settings.SITE_NAME;
  return plainPage({ status, title: TITLES[status] ?? 'Not possible', sentence: problem, siteName, headers });
}

function databaseAway(context: APIContext): Response {
  const pauseS = String(outage.met(context.locals.site.now()));
  const problem = 'Tareline cannot reach its database. It keeps trying, and so will this page.';
  // browsers ignore Retry-After on a page, and it is what programs look for
  const headers = { 'Retry-After': pauseS, ...(isReading(context) ? { Refresh: pauseS } : {}) };
  return turnedAway(context, { status: 503, problem, headers });
}

const isReading = ({ request }: APIContext): boolean => request.method === 'GET';

/** Reads a page to its end, so that whatever fails in it fails here. */
async function whole(response: Response): Promise<Response> {
  if (!isPage(response)) return response;
  return new Response(await response.text(), response);
}

const isPage = (response: Response): boolean =>
  response.headers.get('content-type')?.startsWith('text/html') ?? false;

async function withHeaders(context: APIContext, response: Response): Promise<Response> {
  const astroPolicy = response.headers.get('content-security-policy');
  const html = isPage(response) && astroPolicy !== null ? await response.text() : undefined;
  const inline = html === undefined ? undefined : inlineHashes(html, astroPolicy ?? '');
  // redirects come with headers that cannot be changed in place
  const named = new Response(html ?? response.body, response);
  const headers = securityHeaders({
    publicUrl: context.locals.site.settings.PUBLIC_URL,
    scriptHashes: inline?.scripts ?? [],
    styleHashes: inline?.styles ?? [],
    development,
  });
  for (const [name, value] of Object.entries(headers)) named.headers.set(name, value);
  if (!named.headers.has('cache-control')) named.headers.set('Cache-Control', 'no-store');
  return named;
}
