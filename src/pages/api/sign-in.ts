import type { APIRoute } from 'astro';
import { credentialsSchema } from '../../auth/credentials';
import { refusal } from '../../auth/refusal';
import { createSessions } from '../../auth/sessions';
import { REFUSED_SENTENCE, signIn } from '../../auth/sign-in';
import { waitSentence } from '../../auth/throttle';
import { readSent } from '../../server/problems';

export const POST: APIRoute = async ({ request, locals: { site }, clientAddress }) => {
  const input = await readSent(request, credentialsSchema);
  if (!input.ok) return input.answer;
  const sessions = createSessions({ store: site.store, publicUrl: site.settings.PUBLIC_URL });
  const desk = { store: site.store, sessions, now: () => site.now() };
  const outcome = await signIn(desk, input.value, clientAddress);
  switch (outcome.kind) {
    case 'slowed':
      return refusal(429, waitSentence(outcome.waitMs), {
        headers: { 'Retry-After': String(Math.ceil(outcome.waitMs / 1000)) },
      });
    case 'refused':
      return refusal(401, REFUSED_SENTENCE);
    case 'signed in':
      return Response.json(
        { person: outcome.person },
        { headers: { 'Set-Cookie': outcome.cookie.serialize() } },
      );
  }
};
