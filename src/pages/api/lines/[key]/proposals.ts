import type { APIRoute } from 'astro';
import { requireAbility } from '../../../../auth/guard';
import { newProposalSchema, replaySummarySchema } from '../../../../contract/replay';
import { jsonAnswer, jsonProblem, readSent } from '../../../../server/problems';
import { unknownLine } from '../../../../server/register-answer';
import { unknownReplay } from '../../../../server/replay/answers';
import { replayJobsOf } from '../../../../server/replay/jobs-of';
import { insertProposal } from '../../../../store/proposals';
import { readRegisterLine, settingsInForce } from '../../../../store/register';

/** Keeps what a finished replay tried as a proposal, with a note. */
export const POST: APIRoute = async (context) => {
  const refused = requireAbility(context, 'keep proposals');
  if (refused !== undefined) return refused;
  const { site, person } = context.locals;
  const key = context.params.key ?? '';
  const line = await readRegisterLine(site.store, key);
  if (line === undefined) return unknownLine(key);
  const sent = await readSent(context.request, newProposalSchema.strict());
  if (!sent.ok) return sent.answer;
  const replay = replayJobsOf(site).stateOf(sent.value.replay);
  if (replay === undefined) return unknownReplay();
  if (replay.line !== key) return jsonProblem(409, 'This replay is of another line.');
  if (replay.result === null) return jsonProblem(409, 'This replay has no result that could be kept.');
  const nowMs = site.now();
  const proposal = await insertProposal(
    site.store,
    {
      lineId: line.id,
      recorded: settingsInForce(line.settings, nowMs) ?? null,
      // the distribution is left out: the sheet shows figures
      summary: replaySummarySchema.parse(replay.result),
      note: sent.value.note,
    },
    { by: person!, nowMs },
  );
  return jsonAnswer(proposal, 201);
};
