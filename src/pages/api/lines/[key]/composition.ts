import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { windowOf, windowSchema } from '../../../../server/lines-window';
import { jsonAnswer, jsonProblem, parseSent } from '../../../../server/problems';
import { readComposition } from '../../../../server/reading/composition';
import { unknownLine } from '../../../../server/register-answer';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const asked = parseSent(windowSchema, Object.fromEntries(context.url.searchParams));
  if (!asked.ok) return jsonProblem(400, asked.problem);
  const key = context.params.key ?? '';
  const found = await readComposition(context.locals.site, key, windowOf(asked.value));
  return found === undefined ? unknownLine(key) : jsonAnswer(found);
};
