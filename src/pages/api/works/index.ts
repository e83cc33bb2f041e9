import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { newWorkSchema, worksQuerySchema } from '../../../contract/works';
import { jsonAnswer, jsonProblem, parseSent, readSent } from '../../../server/problems';
import { workRefusal } from '../../../server/work-answer';
import { insertWork, readWorks } from '../../../store/works';

/** Recorded works, the newest first, those withdrawn among them; `?line=<key>` narrows them. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const query = parseSent(worksQuerySchema, Object.fromEntries(context.url.searchParams));
  if (!query.ok) return jsonProblem(400, query.problem);
  return jsonAnswer({ works: await readWorks(context.locals.site.store, query.value) });
};

/** Records work done on a line. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'record work');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const sent = await readSent(context.request, newWorkSchema.strict());
  if (!sent.ok) return sent.answer;
  const kept = await insertWork(site.store, sent.value, { by: person!, nowMs: site.now() });
  return kept.ok ? jsonAnswer(kept.work, 201) : workRefusal(kept);
};
