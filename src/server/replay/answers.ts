import { jsonProblem } from '../problems';
import { REPLAY_LIMITS } from './limits';

const KEPT_MINUTES = REPLAY_LIMITS.keptMs / 60_000;

export const unknownReplay = (): Response =>
  jsonProblem(
    404,
    `This replay is unknown here: it ended more than ${KEPT_MINUTES} minutes ago, or it ran in another web process or before a restart. Run it again.`,
  );
