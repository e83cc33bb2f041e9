import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { jsonAnswer, jsonProblem } from '../../../../server/problems';
import { endFollowUp, readFollowUp } from '../../../../store/follow-ups';

export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'keep follow-ups');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const id = Number(context.params.id);
  const unknown = () => jsonProblem(404, `There is no follow-up with the number ${context.params.id}.`);
  if (!Number.isSafeInteger(id)) return unknown();
  const outcome = await endFollowUp(site.store, id, { by: person!, nowMs: site.now() });
  if (outcome === 'unknown') return unknown();
  if (outcome === 'already done') return jsonProblem(409, 'This follow-up is done already.');
  return jsonAnswer(await readFollowUp(site.store, id));
};
