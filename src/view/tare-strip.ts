import type { Condition } from '../contract/condition';
import type { LineSummary } from '../contract/lines';
import { percentOfMarkText, percentText } from './figures';
import { PHASES, type PhaseName } from './phase';
import { phaseCondition } from './phase-condition';
import type { SiteCustom } from './site-custom';

/** Places on the strip are ratios of its length: 0 at zero amperes, 1 at the post. */
export interface TareLane {
  readonly phase: PhaseName;
  readonly letter: string;
  /** where the marker stands, never past the post; undefined when there is none */
  readonly marker: number | undefined;
  /** the value lies beyond the post */
  readonly beyond: boolean;
  readonly condition: Condition;
  readonly band: { readonly from: number; readonly to: number } | undefined;
  readonly pickup: number | undefined;
}

export interface TareStripPicture {
  readonly lanes: readonly TareLane[];
  /** what the post stands for; with no threshold computable, the recorded pickup, which the threshold never undercuts */
  readonly post: 'threshold' | 'pickup' | 'none';
  readonly near: number | undefined;
  readonly words: string;
}

type Strip = Pick<LineSummary, 'condition' | 'phases' | 'lastDay' | 'creep' | 'pickupAmps' | 'warnings'>;

export function tareStrip(line: Strip, site: SiteCustom): TareStripPicture {
  const post = postOf(line);
  const lanes = PHASES.map((phase) => lane(line, phase, site));
  return {
    lanes,
    post,
    near: post === 'none' ? undefined : site.nearRatio,
    words: stripWords(lanes, line, { post, nearRatio: site.nearRatio }),
  };
}

function postOf(line: Strip): TareStripPicture['post'] {
  if (PHASES.some((phase) => line.phases[phase].thresholdAmps !== null)) return 'threshold';
  return line.pickupAmps === null ? 'none' : 'pickup';
}

function lane(line: Strip, phase: PhaseName, site: SiteCustom): TareLane {
  const { utilisation } = line.phases[phase];
  const fullAmps = fullScaleAmps(line, phase);
  const day = line.lastDay[phase];
  const place = (amps: number) => Math.min(1, amps / fullAmps!);
  return {
    phase,
    letter: site.phaseLetters[phase],
    marker: utilisation === null ? undefined : Math.min(1, utilisation),
    beyond: utilisation !== null && utilisation > 1,
    condition: phaseCondition(line, phase, site.nearRatio),
    band:
      day === null || fullAmps === undefined
        ? undefined
        : { from: place(day.p05Amps), to: place(day.p95Amps) },
    pickup:
      line.pickupAmps === null || fullAmps === undefined || fullAmps === line.pickupAmps
        ? undefined
        : place(line.pickupAmps),
  };
}

/** What the post is worth in this lane: the phase's threshold, else the highest of the others, else the pickup. */
function fullScaleAmps(line: Strip, phase: PhaseName): number | undefined {
  const own = line.phases[phase].thresholdAmps;
  const others = PHASES.map((other) => line.phases[other].thresholdAmps ?? 0);
  const amps = own ?? (Math.max(...others) || (line.pickupAmps ?? 0));
  return amps > 0 ? amps : undefined;
}

function stripWords(
  lanes: readonly TareLane[],
  line: Strip,
  scale: { post: TareStripPicture['post']; nearRatio: number },
): string {
  if (scale.post === 'none') return 'No threshold is recorded, so there is no scale to stand on.';
  const phases = lanes.map(({ phase, letter }) => {
    const { utilisation } = line.phases[phase];
    if (utilisation === null) return `phase ${letter} not computable`;
    return `phase ${letter} at ${percentOfMarkText(utilisation)} of its threshold`;
  });
  const sentence = `${phases.join(', ')}. `;
  const pickup = lanes.find((one) => one.pickup !== undefined)?.pickup;
  const marks = [`near mark at ${percentText(scale.nearRatio)}`];
  if (pickup !== undefined) marks.unshift(`pickup at ${percentText(pickup)}`);
  return `${sentence.charAt(0).toUpperCase()}${sentence.slice(1)}${capital(marks.join(', '))}.`;
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
