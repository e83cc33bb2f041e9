import type { CompositionOnWire } from '../contract/composition';
import type { LineSummary } from '../contract/lines';
import { causeAmps, leakageMatters } from './composition-polygon';
import type { PolygonCause } from './composition-polygon';
import { causeName } from './cause-names';
import { budgetWords, intervalText, tenthsText } from './composition-words';
import type { MismatchOnWire, SeparatedOnWire } from './composition-words';
import { DASH } from './line-figures';
import { inUnit } from './line-unit';
import type { CurrentUnit } from './line-unit';
import { terminalName } from './line-words';

/** A figure of one window, and its 95 % interval where it has one. */
export interface CauseCell {
  readonly figure: string;
  readonly interval: string | undefined;
}

/** One line of a table of causes over two windows; undefined where a window can't tell. */
export interface CauseRow {
  readonly id: PolygonCause | 'differential';
  readonly name: string;
  readonly now: CauseCell | undefined;
  readonly before: CauseCell | undefined;
}

export interface CauseContext {
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
  readonly substations: LineSummary['substations'];
}

type Window = CompositionOnWire | null;

/** The causes of a standing level and their sum, in two windows. Magnitudes: they add up as phasors, not as figures. */
export function causeRows(now: Window, before: Window, context: CauseContext): CauseRow[] {
  const causes: (PolygonCause | 'differential')[] = ['charging', 'leakage', 'ratio', 'angle', 'rest'];
  const told = [now, before].filter(isSeparated);
  const shown = causes.filter((cause) => cause !== 'leakage' || told.some(leaks));
  return [...shown, 'differential' as const].map((id) => ({
    id,
    name: rowName(id, told, context),
    now: causeCell(now, id, context),
    before: causeCell(before, id, context),
  }));
}

const isSeparated = (window: Window): window is SeparatedOnWire => window?.kind === 'separated';

const leaks = ({ polygon, leakageAmps }: SeparatedOnWire): boolean =>
  polygon !== null && leakageMatters(polygon, leakageAmps);

function rowName(
  id: CauseRow['id'],
  told: readonly SeparatedOnWire[],
  { substations }: CauseContext,
): string {
  // With several ends the polygon adds their mismatches up; each stands by itself further down.
  const mismatches = told[0]?.mismatches ?? [];
  const place = mismatches.length === 1 ? mismatches[0]! : null;
  switch (id) {
    case 'charging':
      return 'charging';
    case 'leakage':
      return 'leakage or tapped load';
    case 'ratio':
      return causeName('ratio mismatch', place, substations);
    case 'angle':
      return causeName('angle mismatch', place, substations);
    case 'rest':
      return 'rest';
    case 'differential':
      return 'differential';
  }
}

function causeCell(window: Window, id: CauseRow['id'], context: CauseContext): CauseCell | undefined {
  if (!isSeparated(window) || window.polygon === null) return undefined;
  if (id === 'charging' && window.chargingAmps === null)
    return { figure: 'not told', interval: 'no voltage' };
  const estimate = id === 'charging' ? window.chargingAmps : id === 'leakage' ? window.leakageAmps : null;
  return {
    figure: tenthsText(causeAmps(window.polygon, id), context),
    interval: estimate === null ? undefined : ampsInterval(estimate, context),
  };
}

function ampsInterval(
  { value, low, high }: { value: number; low: number; high: number },
  { unit, ratingAmps }: CauseContext,
): string {
  const shown = (amps: number) => inUnit(amps, unit, ratingAmps) ?? 0;
  const limits = { value: shown(value), low: shown(low), high: shown(high) };
  return intervalText(limits, unit === 'amperes' ? 1 : 4);
}

/** A finding of one window, and whether its whole interval lies outside of what is expected. */
export interface AgainstCell {
  readonly words: string;
  readonly beyond: boolean;
}

/** What was measured in two windows, held against what the register leads one to expect. */
export interface AgainstRow {
  readonly name: string;
  readonly now: AgainstCell;
  readonly before: AgainstCell;
}

/** Charging against the line's constants, each end's mismatch against the class budget, and its angle as channel asymmetry. */
export function againstRows(now: Window, before: Window, context: CauseContext): AgainstRow[] {
  const told = [now, before].filter(isSeparated);
  const terminals = [...new Set(told.flatMap(({ mismatches }) => mismatches.map((each) => each.terminal)))];
  const row = (name: string, terminal: string, of: (mismatch: MismatchOnWire) => AgainstCell) => {
    const cell = (window: Window) => {
      const mismatch = isSeparated(window)
        ? window.mismatches.find((each) => each.terminal === terminal)
        : undefined;
      return mismatch === undefined ? NOT_TOLD : of(mismatch);
    };
    return { name, now: cell(now), before: cell(before) };
  };
  return [
    ...chargingRow(now, before, context),
    ...terminals.flatMap((terminal) => {
      const end = terminalName(terminal, context.substations);
      return [
        row(`ratio of ${end}`, terminal, ratioCell),
        row(`angle of ${end}`, terminal, angleCell),
        row('that angle as channel asymmetry', terminal, asymmetryCell),
      ];
    }),
  ];
}

const NOT_TOLD: AgainstCell = { words: DASH, beyond: false };

const ratioCell = ({ ratio, ratioBudget }: MismatchOnWire): AgainstCell => {
  const percent = { value: 100 * ratio.value, low: 100 * ratio.low, high: 100 * ratio.high };
  return {
    words: `${signedText(percent.value, 2)}\u00a0% (${intervalText(percent, 2)}), ${budgetWords(ratioBudget)}`,
    beyond: ratioBudget === 'beyond',
  };
};

const angleCell = ({ angleDeg, angleBudget }: MismatchOnWire): AgainstCell => ({
  words: `${signedText(angleDeg.value, 2)}° (${intervalText(angleDeg, 2)}), ${budgetWords(angleBudget)}`,
  beyond: angleBudget === 'beyond',
});

const asymmetryCell = ({ asymmetryMs }: MismatchOnWire): AgainstCell => ({
  words: `${signedText(asymmetryMs.value, 3)}\u00a0ms (${intervalText(asymmetryMs, 3)})`,
  beyond: false,
});

const signedText = (value: number, digits: number): string => {
  const text = value.toFixed(digits);
  return Number(text) === 0 ? text.replace('-', '') : text.replace('-', '−');
};

function chargingRow(now: Window, before: Window, context: CauseContext): AgainstRow[] {
  const words = (window: Window): string | undefined => {
    if (!isSeparated(window) || window.chargingAmps === null) return undefined;
    const measured = `${tenthsText(window.chargingAmps.value, context)} (${ampsInterval(window.chargingAmps, context)})`;
    return window.expectedChargingAmps === null
      ? `${measured}; a line constant is missing, so nothing is expected`
      : `${measured}, expected ${tenthsText(window.expectedChargingAmps, context)}${offWords(window)}`;
  };
  const [one, other] = [words(now), words(before)];
  if (one === undefined && other === undefined) return [];
  const cell = (found: string | undefined) => ({ words: found ?? DASH, beyond: false });
  return [{ name: 'charging', now: cell(one), before: cell(other) }];
}

/** How far measured charging is from the expected one, said only where its interval leaves no doubt. */
function offWords({ chargingAmps, expectedChargingAmps }: SeparatedOnWire): string {
  if (chargingAmps === null || expectedChargingAmps === null || expectedChargingAmps <= 0) return '';
  if (chargingAmps.low <= expectedChargingAmps && expectedChargingAmps <= chargingAmps.high) return '';
  const percent = Math.round(100 * Math.abs(chargingAmps.value / expectedChargingAmps - 1));
  if (percent === 0) return '';
  return `: ${percent}\u00a0% ${chargingAmps.value > expectedChargingAmps ? 'more' : 'less'}`;
}

/** "30 days, 1,980 snapshots; residual 0.8 A rms; condition number 12" */
export function qualityWords(window: CompositionOnWire, context: CauseContext): string {
  const counted = countedWords(window);
  if (window.kind !== 'separated') return counted;
  const condition = window.condition < 99.5 ? window.condition.toFixed(1) : Math.round(window.condition);
  return `${counted}; residual ${tenthsText(window.residualRmsAmps, context)} rms; condition number ${condition}`;
}

/** "30 days, 1,980 qualified snapshots" */
export function countedWords({ days, snapshotCount }: CompositionOnWire): string {
  const snapshots = snapshotCount.toLocaleString('en-GB');
  return `${days} ${days === 1 ? 'day' : 'days'}, ${snapshots} qualified ${snapshotCount === 1 ? 'snapshot' : 'snapshots'}`;
}
