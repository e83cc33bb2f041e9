import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { reviewWindowSchema } from '../../../../contract/review';
import { windowOf } from '../../../../server/lines-window';
import { jsonAnswer, jsonProblem, parseSent } from '../../../../server/problems';
import { readReviewCloud } from '../../../../server/reading/review';
import { unknownLine } from '../../../../server/register-answer';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const asked = parseSent(reviewWindowSchema, Object.fromEntries(context.url.searchParams));
  if (!asked.ok) return jsonProblem(400, asked.problem);
  const key = context.params.key ?? '';
  const cloud = await readReviewCloud(context.locals.site, key, windowOf(asked.value));
  return cloud === undefined ? unknownLine(key) : jsonAnswer(cloud);
};
