import type { APIRoute } from 'astro';
import { createSessions } from '../../auth/sessions';
import { signOut } from '../../auth/sign-in';

/** For programs; the pages' own form goes by the action. Signing out twice is no fault. */
export const POST: APIRoute = async ({ request, locals: { site, person } }) => {
  const sessions = createSessions({ store: site.store, publicUrl: site.settings.PUBLIC_URL });
  const desk = { store: site.store, sessions, now: () => site.now() };
  const cookie = await signOut(desk, { person, cookieHeader: request.headers.get('cookie') });
  return Response.json({ signedOut: true }, { headers: { 'Set-Cookie': cookie.serialize() } });
};
