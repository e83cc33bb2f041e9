import { defineAction } from 'astro:actions';
import type { APIContext } from 'astro';
import { credentialsSchema } from '../auth/credentials';
import { choosePassword as choosePasswordByLink, LINK_SPENT_SENTENCE } from '../auth/one-time-links';
import { createSessions, type SessionCookie } from '../auth/sessions';
import { type FrontDesk, REFUSED_SENTENCE, signIn as signInAt, signOut as signOutAt } from '../auth/sign-in';
import { waitSentence } from '../auth/throttle';
import type { Problem } from '../contract/problem';
import { parseSent } from '../server/problems';
import { databaseIsAway } from '../store/database-away';

/** What a form of the signed-out pages comes back with. */
export type FormOutcome =
  | { readonly done: true }
  | ({ readonly done: false; readonly status: number; readonly retryAfterS?: number } & Problem);

const stopped = (
  status: number,
  problem: string,
  more: { fields?: Problem['fields']; retryAfterS?: number } = {},
) => ({ done: false, status, problem, fields: [], ...more }) satisfies FormOutcome;

type ActionContext = Pick<APIContext, 'locals' | 'cookies' | 'request' | 'clientAddress'>;

export const signIn = defineAction({
  accept: 'form',
  handler: (form, context) =>
    unlessDatabaseAway(async () => {
      const input = parseSent(credentialsSchema, Object.fromEntries(form));
      if (!input.ok) return stopped(400, 'See beside the fields.', { fields: input.problem.fields });
      const outcome = await signInAt(deskOf(context), input.value, context.clientAddress);
      if (outcome.kind === 'slowed')
        return stopped(429, waitSentence(outcome.waitMs), { retryAfterS: Math.ceil(outcome.waitMs / 1000) });
      if (outcome.kind === 'refused') return stopped(401, REFUSED_SENTENCE);
      keepCookie(context, outcome.cookie);
      return { done: true };
    }),
});

export const signOut = defineAction({
  accept: 'form',
  handler: (_form, context) =>
    unlessDatabaseAway(async () => {
      const cookieHeader = context.request.headers.get('cookie');
      keepCookie(context, await signOutAt(deskOf(context), { person: context.locals.person, cookieHeader }));
      context.locals.person = undefined;
      return { done: true };
    }),
});

export const choosePassword = defineAction({
  accept: 'form',
  handler: (form, context) =>
    unlessDatabaseAway(async () => {
      const { token, password, again } = Object.fromEntries(form);
      if (typeof token !== 'string' || typeof password !== 'string' || password !== again)
        return stopped(400, 'Not set.', {
          fields: [{ field: 'again', problem: 'The two passwords differ.' }],
        });
      const { site } = context.locals;
      const outcome = await choosePasswordByLink(site.store, { token, password, nowMs: site.now() });
      if (outcome.kind === 'link spent') return stopped(410, LINK_SPENT_SENTENCE);
      if (outcome.kind === 'password refused')
        return stopped(400, 'Not set.', { fields: [{ field: 'password', problem: outcome.problem }] });
      keepCookie(context, await deskOf(context).sessions.open(outcome.person.id));
      return { done: true };
    }),
});

function deskOf({ locals: { site } }: ActionContext): FrontDesk {
  const sessions = createSessions({ store: site.store, publicUrl: site.settings.PUBLIC_URL });
  return { store: site.store, sessions, now: () => site.now() };
}

const keepCookie = ({ cookies }: ActionContext, { name, value, attributes }: SessionCookie): void =>
  cookies.set(name, value, attributes);

// an action's errors reach the page as a value, past the middleware that would have caught this one
async function unlessDatabaseAway(act: () => Promise<FormOutcome>): Promise<FormOutcome> {
  try {
    return await act();
  } catch (error) {
    if (!databaseIsAway(error)) throw error;
    return stopped(503, 'Tareline cannot reach its database just now. Try again in a moment.');
  }
}
