import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { keySchema } from '../../../contract/key';
import { jsonAnswer, jsonProblem } from '../../../server/problems';
import { unknownLine } from '../../../server/register-answer';
import { readProposals } from '../../../store/proposals';
import { readRegisterLine } from '../../../store/register';

/** The proposals kept, newest first; `?line=<key>` narrows them to a line. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const { store } = context.locals.site;
  const asked = context.url.searchParams.get('line');
  if (asked === null) return jsonAnswer({ proposals: await readProposals(store) });
  const key = keySchema.safeParse(asked);
  if (!key.success) return jsonProblem(400, 'A line’s key is lower-case letters, digits and hyphens.');
  if ((await readRegisterLine(store, key.data)) === undefined) return unknownLine(key.data);
  return jsonAnswer({ proposals: await readProposals(store, key.data) });
};
