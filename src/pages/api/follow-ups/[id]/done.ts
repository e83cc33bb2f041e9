import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { followUpDoneSchema } from '../../../../contract/works';
import { jsonAnswer, jsonProblem, readSent } from '../../../../server/problems';
import { workRefusal } from '../../../../server/work-answer';
import { endFollowUp, readFollowUp } from '../../../../store/follow-ups';

/** Ends a follow-up, and records the work that ended it where the body tells of any. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'keep follow-ups');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const id = Number(context.params.id);
  const unknown = () => jsonProblem(404, `There is no follow-up with the number ${context.params.id}.`);
  if (!Number.isSafeInteger(id)) return unknown();
  const sent = await readSent(context.request, followUpDoneSchema.strict(), { whenEmpty: {} });
  if (!sent.ok) return sent.answer;
  const outcome = await endFollowUp(site.store, id, { by: person!, nowMs: site.now(), ...sent.value });
  if (outcome === 'unknown') return unknown();
  if (outcome === 'already done') return jsonProblem(409, 'This follow-up is done already.');
  if (outcome !== 'done') return workRefusal(outcome);
  return jsonAnswer(await readFollowUp(site.store, id));
};
