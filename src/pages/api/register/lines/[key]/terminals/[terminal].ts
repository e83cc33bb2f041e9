import type { APIContext, APIRoute } from 'astro';
import { requireAbility } from '../../../../../../auth/guard';
import { terminalPatchSchema } from '../../../../../../contract/register';
import { readSent } from '../../../../../../server/problems';
import { editAnswer } from '../../../../../../server/register-answer';
import { patchTerminal, removeTerminal } from '../../../../../../store/register-edit';

const named = ({ params }: APIContext) => ({ key: params.key ?? '', terminalKey: params.terminal ?? '' });

export const PATCH: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const sent = await readSent(context.request, terminalPatchSchema.strict());
  if (!sent.ok) return sent.answer;
  const { site, person } = context.locals;
  const change = { ...named(context), patch: sent.value };
  return editAnswer(await patchTerminal(site.store, change, { by: person!, nowMs: site.now() }));
};

/** Only a terminal that was never heard can be removed; PATCH takes one out of service. */
export const DELETE: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const { site, person } = context.locals;
  return editAnswer(await removeTerminal(site.store, named(context), { by: person!, nowMs: site.now() }));
};
