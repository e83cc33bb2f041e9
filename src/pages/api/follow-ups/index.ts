import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { followUpQuerySchema } from '../../../contract/follow-ups';
import { newFollowUpSchema } from '../../../contract/standing';
import { jsonAnswer, jsonProblem, parseSent, readSent } from '../../../server/problems';
import { unknownLine } from '../../../server/register-answer';
import { insertFollowUp, readFollowUps } from '../../../store/follow-ups';

/** Follow-ups, the one due first first; `?line=<key>` and `?state=open|done` narrow them. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see forecast');
  if (refused !== undefined) return refused;
  const query = parseSent(followUpQuerySchema, Object.fromEntries(context.url.searchParams));
  if (!query.ok) return jsonProblem(400, query.problem);
  return jsonAnswer({ followUps: await readFollowUps(context.locals.site.store, query.value) });
};

/** Opens a follow-up for a line. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'keep follow-ups');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const sent = await readSent(context.request, newFollowUpSchema.strict());
  if (!sent.ok) return sent.answer;
  const kept = await insertFollowUp(site.store, sent.value, { by: person!, nowMs: site.now() });
  return kept === undefined ? unknownLine(sent.value.line) : jsonAnswer(kept, 201);
};
