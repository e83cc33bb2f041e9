import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { marginFilterSchema } from '../../../contract/margins';
import { jsonAnswer, jsonProblem, parseSent } from '../../../server/problems';
import { readMarginScatter } from '../../../server/reading/margins';

/** Charging share against mismatch share of every phase that has both, under the list's filters. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see margins');
  if (refused !== undefined) return refused;
  const filter = parseSent(marginFilterSchema, Object.fromEntries(context.url.searchParams));
  if (!filter.ok) return jsonProblem(400, filter.problem);
  return jsonAnswer(await readMarginScatter(context.locals.site, filter.value));
};
