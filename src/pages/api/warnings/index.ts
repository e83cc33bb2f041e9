import type { APIRoute } from 'astro';
import { z } from 'zod';
import { requireAbility } from '../../../auth/guard';
import { warningStateSchema } from '../../../contract/warning';
import { jsonAnswer, jsonProblem, parseSent } from '../../../server/problems';
import { readOpenWarnings, readWarningsInState } from '../../../store/warnings';

/** Without a state: the open ones, which still stand or still wait for somebody. */
const querySchema = z.object({ state: z.union([z.literal('open'), warningStateSchema]).default('open') });

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const asked = parseSent(querySchema, Object.fromEntries(context.url.searchParams));
  if (!asked.ok) return jsonProblem(400, asked.problem);
  const { store } = context.locals.site;
  const { state } = asked.value;
  return jsonAnswer({
    warnings: state === 'open' ? await readOpenWarnings(store) : await readWarningsInState(store, state),
  });
};
