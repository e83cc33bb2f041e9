import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { marginQuerySchema } from '../../../contract/margins';
import { jsonProblem, parseSent } from '../../../server/problems';
import { readEveryMargin } from '../../../server/reading/margins';
import { csvName } from '../../../view/line-csv';
import { marginColumnsOf } from '../../../view/margin-columns';
import { marginCsvHead, marginCsvRows } from '../../../view/margin-csv';
import { siteCustom } from '../../../view/site-custom';

/** The whole list as it is sorted and filtered, with the columns chosen. */
export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see margins');
  if (refused !== undefined) return refused;
  const { site } = context.locals;
  const { columns, ...asked } = Object.fromEntries(context.url.searchParams);
  const query = parseSent(marginQuerySchema, asked);
  if (!query.ok) return jsonProblem(400, query.problem);
  const chosen = marginColumnsOf(columns ?? null);
  const letters = siteCustom(site.settings).phaseLetters;
  const pieces = [marginCsvHead(chosen)];
  for await (const rows of readEveryMargin(site, query.value))
    pieces.push(marginCsvRows(rows, chosen, letters));
  return new Response(`\uFEFF${pieces.join('')}`, {
    headers: {
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': `attachment; filename="${csvName(['margins'], site.now())}"`,
      'cache-control': 'no-store',
    },
  });
};
