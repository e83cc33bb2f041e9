import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../../auth/guard';
import { linePatchSchema } from '../../../../../contract/register';
import { jsonAnswer, readSent } from '../../../../../server/problems';
import { editAnswer, lineOnWire, unknownLine } from '../../../../../server/register-answer';
import { readRegisterLine } from '../../../../../store/register';
import { patchLine } from '../../../../../store/register-edit';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see the register');
  if (refused) return refused;
  const key = context.params.key ?? '';
  const line = await readRegisterLine(context.locals.site.store, key);
  return line === undefined ? unknownLine(key) : jsonAnswer(lineOnWire(line));
};

export const PATCH: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const sent = await readSent(context.request, linePatchSchema.strict());
  if (!sent.ok) return sent.answer;
  const { site, person } = context.locals;
  const change = { key: context.params.key ?? '', patch: sent.value };
  return editAnswer(await patchLine(site.store, change, { by: person!, nowMs: site.now() }));
};
