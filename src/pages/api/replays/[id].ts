import type { APIRoute } from 'astro';
import { requireAbility } from '../../../auth/guard';
import { jsonAnswer, jsonProblem } from '../../../server/problems';
import { unknownReplay } from '../../../server/replay/answers';
import { replayJobsOf } from '../../../server/replay/jobs-of';

/** How far a replay is, and its result once it is done. */
export const GET: APIRoute = (context) => {
  const refused = requireAbility(context, 'see lines');
  if (refused !== undefined) return refused;
  const state = replayJobsOf(context.locals.site).stateOf(context.params.id ?? '');
  return state === undefined ? unknownReplay() : jsonAnswer(state);
};

/** Stops one's own replay; one that has ended already stays as it is. */
export const DELETE: APIRoute = (context) => {
  const refused = requireAbility(context, 'replay settings');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const id = context.params.id ?? '';
  const jobs = replayJobsOf(site);
  const outcome = jobs.cancel(id, person!.id);
  if (outcome === 'not yours') return jsonProblem(403, 'This replay is somebody else’s to cancel.');
  const state = jobs.stateOf(id);
  return state === undefined ? unknownReplay() : jsonAnswer(state);
};
