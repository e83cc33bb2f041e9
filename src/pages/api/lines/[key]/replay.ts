import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { replayRequestSchema } from '../../../../contract/replay';
import { jsonAnswer, jsonProblem, readSent } from '../../../../server/problems';
import { unknownLine } from '../../../../server/register-answer';
import { replayJobsOf } from '../../../../server/replay/jobs-of';
import { runReplay } from '../../../../server/replay/run';
import { readRegisterLine } from '../../../../store/register';
import { replayProblems } from '../../../../view/replay-problems';

const REFUSED = {
  'one of yours runs': {
    status: 409,
    problem: 'A replay of yours is still running. Cancel it or wait for its end.',
  },
  'too many run': {
    status: 503,
    problem: 'Others’ replays are running, as many as there may be at once. Try again shortly.',
  },
} as const satisfies Record<string, { status: number; problem: string }>;

/** Starts a replay in this process. Nothing recorded is changed by it. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'replay settings');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const key = context.params.key ?? '';
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return unknownLine(key);
  const sent = await readSent(context.request, replayRequestSchema.strict());
  if (!sent.ok) return sent.answer;
  const asked = sent.value;
  const fields = replayProblems(asked.settings, line).map(({ field, problem }) => ({
    field: `settings.${field}`,
    problem,
  }));
  if (fields.length > 0)
    return jsonProblem(400, { problem: 'No scheme could be given these settings.', fields });
  const { NEAR_RATIO, PERIOD_MS, NOMINAL_FREQUENCY_HZ } = site.settings;
  const work = {
    line,
    asked,
    nearRatio: NEAR_RATIO,
    periodMs: PERIOD_MS,
    frequencyHz: NOMINAL_FREQUENCY_HZ,
  };
  const started = replayJobsOf(site).start({
    owner: person!.id,
    line: key,
    run: (watch) => runReplay(site.store, work, watch),
  });
  if ('refused' in started) {
    const { status, problem } = REFUSED[started.refused];
    return jsonProblem(status, problem);
  }
  return jsonAnswer({ id: started.id }, 202);
};
