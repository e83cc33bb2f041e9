import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { newLineSchema } from '../../../../contract/register';
import { jsonAnswer, readSent } from '../../../../server/problems';
import { editAnswer, lineOnWire } from '../../../../server/register-answer';
import { readRegister } from '../../../../store/register';
import { insertLine } from '../../../../store/register-edit';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see the register');
  if (refused) return refused;
  const lines = await readRegister(context.locals.site.store);
  return jsonAnswer({ lines: lines.map(lineOnWire) });
};

/** Adds a line with its terminals and settings versions: everything a script needs in one call. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const sent = await readSent(context.request, newLineSchema.strict());
  if (!sent.ok) return sent.answer;
  const mayNot = sent.value.settings.length > 0 && requireAbility(context, 'record settings');
  if (mayNot) return mayNot;
  const { site, person } = context.locals;
  return editAnswer(await insertLine(site.store, sent.value, { by: person!, nowMs: site.now() }), 201);
};
