import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../../../auth/guard';
import { newTerminalSchema } from '../../../../../../contract/register';
import { readSent } from '../../../../../../server/problems';
import { editAnswer } from '../../../../../../server/register-answer';
import { insertTerminal } from '../../../../../../store/register-edit';

export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const sent = await readSent(context.request, newTerminalSchema.strict());
  if (!sent.ok) return sent.answer;
  const { site, person } = context.locals;
  const change = { key: context.params.key ?? '', entry: sent.value };
  return editAnswer(await insertTerminal(site.store, change, { by: person!, nowMs: site.now() }), 201);
};
