import { setImmediate } from 'node:timers/promises';
import type { PolygonOnWire } from '../../contract/composition';
import type { StandingVerdict } from '../../contract/standing';
import type { WarningCause } from '../../contract/warning';
import { perPhase, PHASES, type PhaseName } from '../../protection/phase';
import type { Store } from '../../store/client';
import { replaceCreep } from '../../store/levels';
import { readVerdictsOfLine, type VerdictRow, writeVerdicts } from '../../store/standing';
import { STEP_WARNING } from '../../warnings/limits';
import { readLineHistory } from './line-history';
import { lineSteps } from './line-steps';
import type { StandingFindings } from '../line-watch';
import { countedDrift } from '../../view/counted-drift';
import { phaseVerdict } from './phase-verdict';
import type { RosterLine } from '../roster';

/** Looks at a line's levels, keeps what they say of each phase, and gives what the warnings go by. */
export async function renewFindings(
  store: Store,
  line: RosterLine,
  { nowMs, nearRatio, frequencyHz }: { nowMs: number; nearRatio: number; frequencyHz: number },
): Promise<StandingFindings> {
  const earlier = await readVerdictsOfLine(store, line.id);
  // a line that had its composition an hour ago will hardly need anything else
  const withLoad =
    earlier.length < PHASES.length || earlier.some(({ loadTakenOutBy }) => loadTakenOutBy !== 'composition');
  const history = await readLineHistory(store, line.id, { nowMs, withLoad });
  const steps = await lineSteps(store, line, { history, earlier });
  const verdicts: StandingVerdict[] = [];
  for (const phase of PHASES) {
    verdicts.push(phaseVerdict(line, history, { phase, nearRatio, frequencyHz, step: steps[phase] }));
    // a verdict is a tenth of a second of arithmetic: the feed has its turn between two
    await setImmediate();
  }
  const creep = verdicts.flatMap((verdict) => countedDrift(verdict) ?? []);
  await writeVerdicts(
    store,
    verdicts.map((verdict) => verdictRow(line.id, verdict)),
  );
  await replaceCreep(store, line.id, { creep, computedAt: new Date(nowMs) });
  const levelOf = (phase: PhaseName) => verdicts.find((verdict) => verdict.phase === phase)?.levelAmps;
  return {
    levelAmps: perPhase((phase) => levelOf(phase) ?? undefined),
    creep,
    step: stepThatCounts(verdicts, nowMs),
  };
}

/** The largest recent step up, as a cause for a warning. */
function stepThatCounts(verdicts: readonly StandingVerdict[], nowMs: number): WarningCause | undefined {
  const causes = verdicts.flatMap(({ phase, step, pickupAmps }) => {
    if (step === null || pickupAmps === null) return [];
    const { at, fromAmps, toAmps, channelPathChanged } = step;
    const isRecent = nowMs - Date.parse(at) < STEP_WARNING.recentMs;
    const isLarge = toAmps - fromAmps >= STEP_WARNING.leastShareOfPickup * pickupAmps;
    return isRecent && isLarge
      ? [{ basis: 'step', phase, at, fromAmps, toAmps, channelPathChanged } as const]
      : [];
  });
  return causes.toSorted((one, other) => other.toAmps - other.fromAmps - (one.toAmps - one.fromAmps))[0];
}

function verdictRow(lineId: number, verdict: StandingVerdict): VerdictRow {
  const polygon = verdict.composition.kind === 'separated' ? verdict.composition.polygon : null;
  const drift = countedDrift(verdict);
  return {
    lineId,
    phase: verdict.phase,
    computedAt: new Date(verdict.computedAt),
    levelAmps: verdict.levelAmps,
    shareOfPickup: verdict.shareOfPickup,
    utilisationP95: verdict.utilisationP95,
    emergencyUtilisation: verdict.emergencyUtilisation,
    chargingAmps: polygon && sizeOf(polygon, 'chargingAmps'),
    mismatchAmps: polygon && Math.hypot(sizeOf(polygon, 'ratioAmps'), sizeOf(polygon, 'angleAmps')),
    restAmps: polygon && sizeOf(polygon, 'restAmps'),
    creepAmpsPerMonth: drift?.slopeAmpsPerMonth ?? null,
    creepVerdict: drift?.verdict ?? null,
    nearEarliest: verdict.near?.earliest ?? null,
    nearLikely: verdict.near?.likely ?? null,
    likelyCause: verdict.likelyCause,
    verdict,
  };
}

const sizeOf = (polygon: PolygonOnWire, part: keyof PolygonOnWire): number => Math.hypot(...polygon[part]);
