import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { levelWindowSchema, windowOf } from '../../../../server/lines-window';
import { jsonAnswer, jsonProblem, parseSent } from '../../../../server/problems';
import { readLevelList } from '../../../../server/reading/history';
import { unknownLine } from '../../../../server/register-answer';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const asked = parseSent(levelWindowSchema, Object.fromEntries(context.url.searchParams));
  if (!asked.ok) return jsonProblem(400, asked.problem);
  const key = context.params.key ?? '';
  const list = await readLevelList(context.locals.site, key, {
    ...windowOf(asked.value),
    rung: asked.value.rung,
  });
  return list === undefined ? unknownLine(key) : jsonAnswer(list);
};
