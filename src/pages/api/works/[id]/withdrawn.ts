import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { jsonAnswer, jsonProblem } from '../../../../server/problems';
import { readWork, withdrawWork } from '../../../../store/works';

/** Withdraws a record that was made in error; it stays to be read. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'record work');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const id = Number(context.params.id);
  const unknown = () => jsonProblem(404, `There is no recorded work with the number ${context.params.id}.`);
  if (!Number.isSafeInteger(id)) return unknown();
  const outcome = await withdrawWork(site.store, id, { by: person!, nowMs: site.now() });
  if (outcome === 'unknown') return unknown();
  if (outcome === 'already withdrawn') return jsonProblem(409, 'This record is withdrawn already.');
  return jsonAnswer(await readWork(site.store, id));
};
