import type { AtMark, ReplayPoint, ReplaySide, ReplaySummary } from '../contract/replay';
import { ampsText, durationText, percentText } from './figures';
import { PHASES, type PhaseName } from './phase';
import { momentText, utilisationState, utilisationText, type MarkState } from './replay-words';

export interface SideFigures {
  readonly greatest: string;
  readonly state: MarkState;
  readonly instant: string;
  /** the operating point in words */
  readonly point: string;
  readonly near: string;
  readonly over: string;
  readonly isOver: boolean;
}

export interface PhaseRow {
  readonly phase: PhaseName;
  readonly replayed: SideFigures;
  readonly recorded: SideFigures;
}

/** The figures of both sides, phase by phase. */
export function phaseRows(summary: ReplaySummary, timeZone: string): PhaseRow[] {
  const of = (side: ReplaySide, phase: PhaseName) =>
    sideFigures(side, phase, { nearRatio: summary.nearRatio, timeZone });
  return PHASES.map((phase) => ({
    phase,
    replayed: of(summary.replayed, phase),
    recorded: of(summary.recorded, phase),
  }));
}

function sideFigures(
  side: ReplaySide,
  phase: PhaseName,
  { nearRatio, timeZone }: { nearRatio: number; timeZone: string },
): SideFigures {
  const { greatest, near, over } = side.phases[phase];
  if (greatest === null)
    return { greatest: '–', state: 'settled', instant: '–', point: '–', near: '–', over: '–', isOver: false };
  return {
    greatest: utilisationText(greatest.utilisation, nearRatio),
    state: utilisationState(greatest.utilisation, nearRatio),
    instant: momentText(greatest.at, timeZone),
    point: pointText(greatest),
    near: markText(near),
    over: markText(over),
    isOver: over.snapshots > 0,
  };
}

/** "12 · 24 s": snapshots and time; "none" */
const markText = ({ snapshots, durationMs }: AtMark): string =>
  snapshots === 0
    ? 'none'
    : `${snapshots.toLocaleString('en-GB', { useGrouping: 'min2' })} · ${durationText(durationMs)}`;

/** "98 A at 640 A restraint, threshold 160 A", or the place in the scheme's region */
export function pointText({ differentialAmps, restraintAmps, thresholdAmps, region }: ReplayPoint): string {
  if (restraintAmps !== null)
    return `${ampsText(differentialAmps)} at ${ampsText(restraintAmps)} restraint, threshold ${ampsText(thresholdAmps)}`;
  const differential = `differential ${ampsText(differentialAmps)}`;
  if (region === null) return `${differential}; a current too small to have a place in the region`;
  return region.kind === 'alpha-plane'
    ? `${differential}; ratio ${region.ratio.toFixed(2)} at ${((region.angleDeg + 360) % 360).toFixed(0)}°`
    : `${differential}; ${region.deviationDeg.toFixed(1)}° from opposition`;
}

export const nearHead = (nearRatio: number): string => `at ≥ ${percentText(nearRatio)}`;
