import type { CompositionOnWire, EstimateOnWire } from '../contract/composition';
import type { StandingVerdict, StepOnWire } from '../contract/standing';
import { causeAmps, leakageMatters, POLYGON_CAUSES } from './composition-polygon';
import type { PolygonCause } from './composition-polygon';
import { countedWords } from './composition-rows';
import { tenthsText } from './composition-words';
import type { SeparatedOnWire, StandingWordsContext } from './composition-words';
import { dateText } from './figures';
import { currentText } from './line-figures';
import type { CurrentUnit } from './line-unit';
import { listed, terminalName } from './line-words';

interface AmpsContext {
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
}

/** "Why phase B stands at 38 A" */
export function whyTitle(
  verdict: StandingVerdict | undefined,
  { letter, unit, ratingAmps }: AmpsContext & { letter: string },
): string {
  const levelAmps = verdict?.levelAmps ?? null;
  if (levelAmps === null) return `Why phase ${letter} stands where it does`;
  return `Why phase ${letter} stands at ${currentText(levelAmps, unit, ratingAmps)}`;
}

/** "At the typical load of 1 Nov to 1 Dec 2026: 30 days, 1,980 qualified snapshots; separable" */
export function whyCaption(composition: CompositionOnWire, timeZone: string): string {
  const noon = (day: string) => dateText(`${day}T12:00:00Z`, timeZone);
  const window = `${noon(composition.from)} to ${noon(composition.to)}`;
  const told = composition.kind === 'separated' ? 'separable' : 'not separable';
  const load = composition.kind === 'separated' ? 'At the typical load of ' : '';
  return `${load}${window}: ${countedWords(composition)}, ${told}`;
}

/** A history that reaches across a step is told on either side of it by itself, and has to say so. */
export function stepInWindowWords(
  composition: CompositionOnWire,
  step: StepOnWire | null,
  timeZone: string,
): string | undefined {
  if (step === null || step.at < composition.from || step.at.slice(0, 10) >= composition.to) return undefined;
  return `This window reaches across the step of ${dateText(step.at, timeZone)}: the days on either side of it are told by themselves, and the day itself is left out.`;
}

/** An interval that reaches further to either side than this share of the differential tells little. */
const WEAK_SHARE = 0.5;

/**
 * Which causes a separable window still tells only weakly, as a sentence to stand above the drawing; undefined where
 * all of them are told well. A mismatch's interval is taken in proportion to its share of the differential.
 */
export function weakWords(composition: SeparatedOnWire): string | undefined {
  const { polygon, chargingAmps, leakageAmps, mismatches } = composition;
  if (polygon === null) return undefined;
  const most = WEAK_SHARE * causeAmps(polygon, 'differential');
  const half = ({ low, high }: EstimateOnWire) => (high - low) / 2;
  const scaled = (estimate: EstimateOnWire, amps: number) =>
    estimate.value === 0 ? 0 : (half(estimate) * amps) / Math.abs(estimate.value);
  const alone = mismatches.length === 1 ? mismatches[0] : undefined;
  const reaches = [
    { name: 'charging', amps: chargingAmps === null ? 0 : half(chargingAmps) },
    { name: 'leakage', amps: leakageAmps === null ? 0 : half(leakageAmps) },
    { name: 'ratio', amps: alone === undefined ? 0 : scaled(alone.ratio, causeAmps(polygon, 'ratio')) },
    { name: 'angle', amps: alone === undefined ? 0 : scaled(alone.angleDeg, causeAmps(polygon, 'angle')) },
  ];
  const weak = reaches.filter(({ amps }) => amps > most).map(({ name }) => name);
  if (weak.length === 0) return undefined;
  return `Weakly told: the ${weak.length === 1 ? 'interval' : 'intervals'} of ${listed(weak)} ${weak.length === 1 ? 'is' : 'are'} as wide as the differential itself. Something may have changed within this window; read the causes by their intervals.`;
}

/** The words of the sides: "ratio 27.1 A". Leakage only where it matters. */
export function polygonWords(
  { polygon, leakageAmps }: SeparatedOnWire,
  context: AmpsContext,
): Partial<Record<PolygonCause | 'differential', string>> {
  if (polygon === null) return {};
  const shown = POLYGON_CAUSES.filter((cause) => cause !== 'leakage' || leakageMatters(polygon, leakageAmps));
  return Object.fromEntries(
    [...shown, 'differential' as const].map((cause) => [
      cause,
      `${cause} ${tenthsText(causeAmps(polygon, cause), context)}`,
    ]),
  );
}

/** The drawing in words, for whoever doesn't see it. */
export function polygonSentence(composition: SeparatedOnWire, context: AmpsContext): string {
  const { differential, ...causes } = polygonWords(composition, context);
  return `Laid head to tail, ${Object.values(causes).join(', ')} lead to the ${differential ?? 'differential'}.`;
}

/**
 * A mismatch that changes with load, in a sentence, with what that leaves of the charging; undefined where it does not.
 * Transformers err most at small current.
 */
export function loadDependenceWords(
  dependence: StandingVerdict['loadDependence'],
  { substations, unit, ratingAmps }: Pick<StandingWordsContext, 'substations' | 'unit' | 'ratingAmps'>,
): string | undefined {
  if (dependence === null) return undefined;
  const { terminal, against, ratioChange, angleChangeDeg, lightAmps, heavyAmps, chargingAmps } = dependence;
  const amps = { unit, ratingAmps };
  const signed = (value: number, digits: number) =>
    `${value < 0 ? '−' : '+'}${Math.abs(value).toFixed(digits)}`;
  return (
    `The mismatch of ${terminalName(terminal, substations)} against ${terminalName(against, substations)} changes with load: ` +
    `${signed(100 * ratioChange, 2)} % and ${signed(angleChangeDeg, 2)}° at ${tenthsText(lightAmps, amps)} compared with ${tenthsText(heavyAmps, amps)}. ` +
    `The charging may then be anything from ${tenthsText(chargingAmps.low, amps)} to ${tenthsText(chargingAmps.high, amps)}.`
  );
}
