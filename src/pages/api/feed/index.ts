import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { jsonAnswer } from '../../../server/problems';
import { readFeedHealth } from '../../../store/feed-health';

export const GET: APIRoute = async (context) => {
  const refused = requireAbility(context, 'see feeds');
  if (refused) return refused;
  const { site } = context.locals;
  return jsonAnswer(await readFeedHealth(site.store, site.now()));
};
