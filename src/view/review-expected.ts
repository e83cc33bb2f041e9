import type { LineSummary } from '../contract/lines';
import type { TerminalResult } from '../contract/result';
import type { SettingsVersion } from '../contract/settings-version';
import { channelTimeErrorMs } from '../protection/channel';
import { chargingAmps, susceptanceMicrosiemensPerKm } from '../protection/charging';
import { classBudget } from '../protection/ct-class';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import { expectedStanding, standingJudgement } from '../protection/expected-standing';
import type { ExpectedStanding, StandingCauses, StandingJudgement } from '../protection/expected-standing';
import { perPhase } from '../protection/phase';
import type { PerPhase, PhaseName } from '../protection/phase';
import { magnitude } from '../protection/phasor';
import { ampsText, percentText } from './figures';
import { reviewClasses } from './review-classes';
import { NO_CAPACITANCE } from './review-model';
import type { ReviewLine } from './review-line';
import type { ReviewSnapshot } from './review-now';

/** Expected against measured for one phase. */
export interface ExpectedPhase {
  readonly expected: ExpectedStanding;
  readonly measuredAmps: number | null;
  readonly judgement: StandingJudgement | undefined;
  readonly verdict: string;
}

/** Expected standing levels, beside what they were formed from, in words. */
export interface ExpectedLevels {
  readonly phases: PerPhase<ExpectedPhase>;
  /** the same with nothing compensated: what the pickup window starts from; the highest of the phases */
  readonly uncompensatedAmps: number | undefined;
  /** one sentence for each cause, and for each that is missing */
  readonly assumptions: readonly string[];
}

interface ExpectedInput {
  readonly line: ReviewLine;
  readonly recorded: Pick<SettingsVersion, 'chargingCompensation'>;
  readonly snapshot: ReviewSnapshot | NotComputable;
  readonly results: readonly TerminalResult[];
  readonly lastDay: LineSummary['lastDay'];
  /** through current now, amperes; stands in where the last day has none */
  readonly throughAmps: number | null;
}

/** What a standing level is expected to be by the line's causes, against the measured one of the last 24 hours. */
export function expectedLevels(input: ExpectedInput): ExpectedLevels | NotComputable {
  const { line, recorded, lastDay } = input;
  const throughAmps = line.dayThroughAmps ?? input.throughAmps;
  if (throughAmps === null) {
    return { notComputable: 'The through current of the last 24 hours is not known, nor is that of now.' };
  }
  const fallback = compensationFallback(recorded, input.snapshot);
  const uncompensated = perPhase((phase) => causes(input, phase, throughAmps));
  const phases = perPhase((phase) => {
    const remains = recorded.chargingCompensation && fallback === undefined ? 0 : undefined;
    const own = uncompensated[phase];
    const expected = expectedStanding(remains === undefined ? own : { ...own, chargingAmps: remains });
    const measuredAmps = lastDay[phase]?.standingAmps ?? null;
    const judgement = measuredAmps === null ? undefined : standingJudgement(measuredAmps, expected);
    return { expected, measuredAmps, judgement, verdict: verdictWords(expected, measuredAmps, judgement) };
  });
  return {
    phases,
    uncompensatedAmps: greatest(
      perPhase((phase) => expectedStanding(uncompensated[phase]).rootSumSquareAmps),
    ),
    assumptions: assumptions(input, { throughAmps, fallback }),
  };
}

function causes(
  { line, snapshot, results }: ExpectedInput,
  phase: PhaseName,
  throughAmps: number,
): StandingCauses {
  const classes = reviewClasses(line);
  const capacitance = line.capacitanceNfPerKm;
  return {
    throughAmps,
    chargingAmps:
      capacitance === null
        ? undefined
        : chargingAmps({
            susceptanceMicrosiemensPerKm: susceptanceMicrosiemensPerKm(capacitance, line.nominalFrequencyHz),
            lengthKm: line.lengthKm,
            voltageKv: measuredVoltageKv(snapshot, phase) ?? line.voltageKv,
          }),
    classBudget: isComputable(classes) ? classBudget(classes) : undefined,
    channel: channelTime(results, line.nominalFrequencyHz),
  };
}

/** Mean of the valid voltages of a phase as a phase-to-phase voltage, kilovolts. */
function measuredVoltageKv(snapshot: ExpectedInput['snapshot'], phase: PhaseName): number | undefined {
  if (!isComputable(snapshot)) return undefined;
  // behind a transformer the voltage is another one; the terminals on the line are those without a ratio
  const valid = snapshot.sent.flatMap(({ voltagesKv }, index) =>
    voltagesKv === undefined || !snapshot.onLine[index] ? [] : [magnitude(voltagesKv[phase])],
  );
  if (valid.length === 0) return undefined;
  return (Math.sqrt(3) * valid.reduce((total, kv) => total + kv, 0)) / valid.length;
}

/** The greatest time error by the channel where a terminal takes its time from it; undefined where none does. */
function channelTime(results: readonly TerminalResult[], frequencyHz: number): StandingCauses['channel'] {
  const timed = results.filter(({ clock }) => clock?.source === 'channel');
  if (timed.length === 0) return undefined;
  const errors = timed.flatMap(({ channel }) =>
    channel === null ? [] : [Math.abs(channelTimeErrorMs(channel.send_ms, channel.receive_ms))],
  );
  return { timeErrorMs: errors.length === 0 ? undefined : Math.max(...errors), frequencyHz };
}

function compensationFallback(
  { chargingCompensation }: ExpectedInput['recorded'],
  snapshot: ExpectedInput['snapshot'],
): string | undefined {
  if (!chargingCompensation || !isComputable(snapshot)) return undefined;
  const { compensation } = snapshot.zone.a;
  return compensation?.state === 'fallback' ? compensation.reason : undefined;
}

function verdictWords(
  { missing, worstCaseAmps, leastAmps }: ExpectedStanding,
  measuredAmps: number | null,
  judgement: StandingJudgement | undefined,
): string {
  if (measuredAmps === null) return 'No snapshot of the last 24 hours qualified: nothing to hold against it.';
  if (worstCaseAmps === undefined || leastAmps === undefined || judgement === undefined)
    return `No verdict: ${missing.map((cause) => MISSING[cause]).join(', ')} not known.`;
  switch (judgement) {
    case 'within':
      return leastAmps === 0
        ? `Within what is expected, up to ${ampsText(worstCaseAmps)}.`
        : `Within what is expected, ${ampsText(leastAmps)} to ${ampsText(worstCaseAmps)}.`;
    case 'above':
      return `Above all that is expected together, ${ampsText(worstCaseAmps)}: something adds to it.`;
    case 'far below':
      return `Far below the ${ampsText(leastAmps)} that must be left: frozen values, or compensated twice?`;
  }
}

const MISSING = {
  charging: 'charging is',
  transformers: 'the transformers’ classes are',
  channel: 'the channel’s delays are',
} as const;

function assumptions(
  { line, recorded, snapshot, results }: ExpectedInput,
  { throughAmps, fallback }: { throughAmps: number; fallback: string | undefined },
): string[] {
  const classes = reviewClasses(line);
  const budget = isComputable(classes) ? classBudget(classes) : undefined;
  const ownVoltage = measuredVoltageKv(snapshot, 'a') !== undefined;
  return [
    line.capacitanceNfPerKm === null
      ? NO_CAPACITANCE
      : `Charging: line constants at ${ownVoltage ? 'the voltage measured now' : 'nominal voltage'} and ${line.nominalFrequencyHz} Hz.`,
    ...(recorded.chargingCompensation
      ? [fallback ?? 'The scheme compensates charging, so that none is expected to be left.']
      : []),
    isComputable(classes)
      ? `Transformers: two ends at opposite limits of their classes, ${budget === undefined ? '–' : percentText(budget.differentialRatio)} of a through current of ${ampsText(throughAmps)} (${line.dayThroughAmps === null ? 'now' : 'mean of the last 24 hours'})${budget?.isDisplacementStated === false ? '; a class states no phase displacement, so the ratio alone is in it' : ''}.`
      : classes.notComputable,
    results.some(({ clock }) => clock?.source === 'channel')
      ? 'Channel: half the difference of the delays measured now, as an angle on the through current.'
      : 'Channel: time does not come from the channel, so its asymmetry adds nothing.',
  ];
}

function greatest(values: PerPhase<number | undefined>): number | undefined {
  const known = [values.a, values.b, values.c].filter((value) => value !== undefined);
  return known.length < 3 ? undefined : Math.max(...known);
}
