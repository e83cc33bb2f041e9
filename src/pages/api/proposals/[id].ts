import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { jsonAnswer, jsonProblem } from '../../../server/problems';
import { readProposal } from '../../../store/proposals';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const id = Number(context.params.id);
  const proposal = Number.isSafeInteger(id) ? await readProposal(context.locals.site.store, id) : undefined;
  if (proposal === undefined)
    return jsonProblem(404, `There is no proposal with the number ${context.params.id}.`);
  return jsonAnswer(proposal);
};
