import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../../auth/guard';
import { newSettingsVersionSchema } from '../../../../../contract/register';
import { jsonAnswer, readSent } from '../../../../../server/problems';
import { editAnswer, unknownLine } from '../../../../../server/register-answer';
import { readRegisterLine, settingsInForce } from '../../../../../store/register';
import { insertSettingsVersion } from '../../../../../store/register-edit';

/** The versions, oldest first, and the id of the one in force now; null when none is. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see the register');
  if (refused) return refused;
  const { site } = context.locals;
  const key = context.params.key ?? '';
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return unknownLine(key);
  const inForce = settingsInForce(line.settings, site.now());
  return jsonAnswer({ line: key, inForce: inForce?.id ?? null, settings: line.settings });
};

export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'record settings');
  if (refused) return refused;
  const sent = await readSent(context.request, newSettingsVersionSchema.strict());
  if (!sent.ok) return sent.answer;
  const { site, person } = context.locals;
  const change = { key: context.params.key ?? '', version: sent.value };
  return editAnswer(await insertSettingsVersion(site.store, change, { by: person!, nowMs: site.now() }), 201);
};
