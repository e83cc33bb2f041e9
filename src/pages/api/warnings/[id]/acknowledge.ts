import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { acknowledgeSchema } from '../../../../contract/warning';
import { jsonAnswer, jsonProblem, readSent } from '../../../../server/problems';
import { insertAuditEntry } from '../../../../store/audit';
import { acknowledgeWarning, readWarning } from '../../../../store/warnings';

export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'acknowledge warnings');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const id = Number(context.params.id);
  const unknown = () => jsonProblem(404, `There is no warning with the number ${context.params.id}.`);
  if (!Number.isSafeInteger(id)) return unknown();
  const sent = await readSent(context.request, acknowledgeSchema);
  if (!sent.ok) return sent.answer;
  const at = new Date(site.now());
  const { note } = sent.value;
  const outcome = await acknowledgeWarning(site.store, id, { by: person!.name, note, at });
  const warning = await readWarning(site.store, id);
  if (outcome === 'unknown' || warning === undefined) return unknown();
  // browsers of this process see it with the next tick; other processes find it in the database
  site.live.takeWarnings([warning]);
  if (outcome === 'already acknowledged')
    return jsonProblem(
      409,
      `${warning.acknowledgedBy} has acknowledged this warning already; the first note stands.`,
    );
  await insertAuditEntry(site.store, {
    at,
    person,
    action: 'warning acknowledged',
    subject: `warning ${id} of ${warning.line}`,
    detail: { note },
  });
  return jsonAnswer(warning);
};
