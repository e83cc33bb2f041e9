import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { importProblem } from '../../../records/import-problem';
import { registerPlan } from '../../../records/register-plan';
import { uploadedFile } from '../../../records/uploaded-file';
import { jsonAnswer, jsonProblem } from '../../../server/problems';
import { dryImport, writeImport, type Plan } from '../../../store/register-import';

/**
 * What a file would do to the register, or with `?dry=false` doing it: as a whole, or not at all. Every problem
 * comes by row and column.
 */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'edit the register');
  if (refused) return refused;
  const { searchParams } = context.url;
  const dry = searchParams.get('dry') ?? 'true';
  if (dry !== 'true' && dry !== 'false') return jsonProblem(400, 'dry is true or false.');
  const file = await uploadedFile(context.request, searchParams.get('name') ?? 'sent by a script');
  if (!file.ok) return jsonProblem(file.status, file.problem);
  const { site, person } = context.locals;
  const plan: Plan = (register) => registerPlan(file.text, register);
  const looked = await dryImport(site.store, plan);
  const mayNot = looked.kind === 'settings' && requireAbility(context, 'record settings');
  if (mayNot) return mayNot;
  if (dry === 'true') return jsonAnswer({ ...looked, ...importProblem(looked) });
  const editing = { by: person!, nowMs: site.now() };
  const report = await writeImport(site.store, { plan, fileName: file.name }, editing);
  return jsonAnswer({ ...report, ...importProblem(report) }, report.problems.length > 0 ? 400 : 200);
};
