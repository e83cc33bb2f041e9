import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireAbility } from '../../../../auth/guard';
import { jsonAnswer, jsonProblem, parseSent } from '../../../../server/problems';
import { readComparison } from '../../../../server/reading/comparison';
import { unknownLine } from '../../../../server/register-answer';

const querySchema = z.object({ at: z.iso.date('Give a date, such as 2026-03-01.') });

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const asked = parseSent(querySchema, Object.fromEntries(context.url.searchParams));
  if (!asked.ok) return jsonProblem(400, asked.problem);
  const key = context.params.key ?? '';
  const found = await readComparison(context.locals.site, key, asked.value.at);
  return found === undefined ? unknownLine(key) : jsonAnswer(found);
};
