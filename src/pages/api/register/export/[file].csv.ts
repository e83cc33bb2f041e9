import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { importKindSchema } from '../../../../contract/register-import';
import { registerFile } from '../../../../records/register-files';
import { jsonProblem } from '../../../../server/problems';
import { readRegister } from '../../../../store/register';

/** One of the register's three files: lines.csv, terminals.csv, settings.csv. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see the register');
  if (refused) return refused;
  const kind = importKindSchema.safeParse(context.params.file);
  if (!kind.success) return jsonProblem(404, 'There are lines.csv, terminals.csv and settings.csv.');
  const lines = await readRegister(context.locals.site.store);
  return new Response(registerFile(kind.data, lines), {
    headers: {
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': `attachment; filename="${kind.data}.csv"`,
    },
  });
};
