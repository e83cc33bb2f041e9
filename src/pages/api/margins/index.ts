import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { marginQuerySchema } from '../../../contract/margins';
import { jsonAnswer, jsonProblem, parseSent } from '../../../server/problems';
import { readMarginList } from '../../../server/reading/margins';

/** A page of the fleet: one row a phase of a line, sorted and filtered. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see margins');
  if (refused !== undefined) return refused;
  const query = parseSent(marginQuerySchema, Object.fromEntries(context.url.searchParams));
  if (!query.ok) return jsonProblem(400, query.problem);
  return jsonAnswer(await readMarginList(context.locals.site, query.value));
};
