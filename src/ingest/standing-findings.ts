import type { PolygonOnWire } from '../contract/composition';
import type { StandingVerdict } from '../contract/standing';
import { perPhase, PHASES } from '../protection/phase';
import type { Store } from '../store/client';
import { replaceCreep } from '../store/levels';
import { type VerdictRow, writeVerdicts } from '../store/standing';
import { readLineHistory } from './line-history';
import type { StandingFindings } from './line-watch';
import { phaseVerdict } from './phase-verdict';
import type { RosterLine } from './roster';

/** Looks at a line's levels, keeps what they say of each phase, and gives what the warnings go by. */
export async function renewFindings(
  store: Store,
  line: RosterLine,
  { nowMs, nearRatio, frequencyHz }: { nowMs: number; nearRatio: number; frequencyHz: number },
): Promise<StandingFindings> {
  const history = await readLineHistory(store, line.id, nowMs);
  const verdicts = perPhase((phase) => phaseVerdict(line, history, { phase, nearRatio, frequencyHz }));
  // a drift with the growth of load counts only where the load can't be taken out of it
  const creep = PHASES.flatMap((phase) => driftThatCounts(verdicts[phase]) ?? []);
  await writeVerdicts(
    store,
    PHASES.map((phase) => verdictRow(line.id, verdicts[phase])),
  );
  await replaceCreep(store, line.id, { creep, computedAt: new Date(nowMs) });
  return { levelAmps: perPhase((phase) => verdicts[phase].levelAmps ?? undefined), creep };
}

function driftThatCounts({ creep, creepAtReference, composition }: StandingVerdict) {
  return composition.kind === 'separated' ? creepAtReference?.creep : (creep ?? undefined);
}

function verdictRow(lineId: number, verdict: StandingVerdict): VerdictRow {
  const polygon = verdict.composition.kind === 'separated' ? verdict.composition.polygon : null;
  const drift = driftThatCounts(verdict);
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
