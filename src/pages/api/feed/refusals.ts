import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireAbility } from '../../../auth/guard';
import { refusalReasonSchema } from '../../../contract/feed';
import { jsonAnswer, jsonProblem, parseSent } from '../../../server/problems';
import { readKeptRefusals } from '../../../store/feed-health';

const wholeNumber = 'Give a whole number above 0.';
const windowSchema = z.strictObject({
  reason: refusalReasonSchema.optional(),
  /** only messages older than the one with this id: the last id of the page before */
  before: z.coerce.number(wholeNumber).int(wholeNumber).positive(wholeNumber).optional(),
  limit: z.coerce
    .number(wholeNumber)
    .int(wholeNumber)
    .positive(wholeNumber)
    .max(200, 'One answer carries at most 200 messages.')
    .default(50),
});

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see feeds');
  if (refused) return refused;
  const window = parseSent(windowSchema, Object.fromEntries(context.url.searchParams));
  if (!window.ok) return jsonProblem(400, window.problem);
  return jsonAnswer({ refusals: await readKeptRefusals(context.locals.site.store, window.value) });
};
