import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { jsonAnswer } from '../../../../server/problems';
import { readLineDetail } from '../../../../server/reading/lines';
import { unknownLine } from '../../../../server/register-answer';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const key = context.params.key ?? '';
  const detail = await readLineDetail(context.locals.site, key);
  return detail === undefined ? unknownLine(key) : jsonAnswer(detail);
};
