import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { jsonAnswer } from '../../../server/problems';
import { readLineList } from '../../../server/reading/lines';

export const GET: APIRoute = async (context) =>
  requireAbility(context, 'see lines') ?? jsonAnswer(await readLineList(context.locals.site));
