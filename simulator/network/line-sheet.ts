import type { NewLine } from '../../src/contract/register';
import type { ChannelTruth } from '../plant/channel';
import type { ClockLoss } from '../plant/clock';
import { eachPhase, type Three } from '../plant/complex';
import type { LoadProfile } from '../plant/load';
import type { Gap } from '../plant/gap';
import { hashed, seedOf } from '../plant/noise';
import type { Ramp } from '../plant/ramp';
import type { Branch, CapacitanceDrift, CtError, LineTruth, RatioDrift } from '../plant/truth';
import type { Stretch } from './conductors';
import { type SubstationKey, substations } from './substations';

/** One line of the invented network on one sheet: what the register holds, and what is physically so. */
export type LineSheet = {
  readonly name: string;
  readonly key: string;
  readonly voltageKv: number;
  readonly ratingAmps: number;
  readonly emergencyRatingAmps: number;
  readonly at: readonly SubstationKey[];
  readonly ctPrimaryAmps: number | readonly number[];
  readonly ctClass: string;
  /** for a tee, the stretches from each terminal to it, in the terminals' order */
  readonly stretches: readonly (readonly Stretch[])[];
  readonly settings: NewLine['settings'];
  readonly load: LoadProfile;
  readonly secondShare?: number;
  /** from the owner's short-circuit study; some lines have none recorded */
  readonly leastInternalFaultAmps?: number;
  readonly goesBy?: NewLine['goesBy'];
  readonly inZoneTransformer?: NonNullable<NewLine['inZoneTransformer']>;
  readonly transformerReactanceOhm?: number;
  /** share of the line's own reactance that a capacitor in series takes away */
  readonly seriesCompensation?: number;
  /** phase errors by terminal: percent and minutes; others are drawn within ±`ctSpread` percent */
  readonly ctErrors?: { readonly [terminal: string]: Three<readonly [percent: number, minutes: number]> };
  readonly ctSpread?: number;
  readonly ratioDrift?: RatioDrift;
  readonly capacitanceDrift?: CapacitanceDrift;
  /** by terminal: which phase's transformer gave way on which day to one of which error, in percent and minutes */
  readonly replaced?: {
    readonly [terminal: string]: {
      readonly phase: 0 | 1 | 2;
      readonly atDay: number;
      readonly error: readonly [percent: number, minutes: number];
    };
  };
  /** by terminal, microseconds a day */
  readonly clockDrift?: { readonly [terminal: string]: Ramp };
  readonly gaps?: { readonly [terminal: string]: readonly Gap[] };
  readonly channel?: ChannelTruth;
  readonly timeFrom?: 'satellite' | 'channel';
  readonly clockLoss?: { readonly [terminal: string]: ClockLoss };
  readonly missingShare?: { readonly [terminal: string]: number };
  readonly breakers?: 'closed' | 'open';
  readonly hasVoltage?: boolean;
  readonly reportsToo?: boolean;
};

export type DemoLine = { readonly line: NewLine; readonly truth: LineTruth };

export const demoLine = (sheet: LineSheet): DemoLine => ({
  line: registerLine(sheet),
  truth: lineTruth(sheet),
});

function registerLine(sheet: LineSheet): NewLine {
  const stretches = sheet.stretches.flat();
  const lengthKm = round(
    stretches.reduce((sum, stretch) => sum + stretch.km, 0),
    1,
  );
  const capacitanceNf = stretches.reduce((sum, { of, km }) => sum + of.capacitanceNfPerKm * km, 0);
  const kinds = new Set(stretches.map((stretch) => stretch.of.kind));
  return {
    key: sheet.key,
    name: sheet.name,
    owner: ownerOf(sheet),
    voltageKv: sheet.voltageKv,
    ratingAmps: sheet.ratingAmps,
    emergencyRatingAmps: sheet.emergencyRatingAmps,
    lengthKm,
    kind: kinds.size > 1 ? 'mixed' : [...kinds][0]!,
    capacitanceNfPerKm: round(capacitanceNf / lengthKm, 2),
    leastInternalFaultAmps: sheet.leastInternalFaultAmps ?? null,
    goesBy: sheet.goesBy ?? 'phasors',
    inService: true,
    seriesCompensated: sheet.seriesCompensation !== undefined,
    inZoneTransformer: sheet.inZoneTransformer ?? null,
    terminals: sheet.at.map((substation, position) => ({
      key: substation,
      substation,
      substationName: substations[substation],
      ctPrimaryAmps:
        typeof sheet.ctPrimaryAmps === 'number' ? sheet.ctPrimaryAmps : sheet.ctPrimaryAmps[position]!,
      ctClass: sheet.ctClass,
      inService: true,
    })),
    settings: sheet.settings,
  };
}

/** The transmission lines are one company's, those below another's. */
const ownerOf = ({ voltageKv }: LineSheet): string =>
  voltageKv >= 220 ? 'Tarnside Transmission' : 'Pellwater Networks';

const QUIET_CHANNEL: ChannelTruth = {
  usual: { path: 'main', delayMs: 3.6, asymmetryMs: 0.01 },
  lossPpm: 3,
};

function lineTruth(sheet: LineSheet): LineTruth {
  return {
    key: sheet.key,
    substation: sheet.at[0]!,
    voltageKv: sheet.voltageKv,
    ratingAmps: sheet.ratingAmps,
    terminals: sheet.at.map((key) => terminalTruth(sheet, key)),
    branches: sheet.stretches.map((stretches) => branchOf(stretches, sheet)),
    load: sheet.load,
    secondShare: sheet.secondShare ?? 0,
    ...(sheet.inZoneTransformer && {
      transformer: {
        ratio: sheet.voltageKv / sheet.inZoneTransformer.otherVoltageKv,
        clockNumber: sheet.inZoneTransformer.clockNumber,
      },
    }),
    ...(sheet.ratioDrift && { ratioDrift: sheet.ratioDrift }),
    ...(sheet.capacitanceDrift && { capacitanceDrift: sheet.capacitanceDrift }),
    channel: sheet.channel ?? QUIET_CHANNEL,
    breakers: sheet.breakers ?? 'closed',
    hasVoltage: sheet.hasVoltage ?? true,
    reportsToo: sheet.reportsToo ?? false,
  };
}

function terminalTruth(sheet: LineSheet, key: string): LineTruth['terminals'][number] {
  const loss = sheet.clockLoss?.[key];
  const drift = sheet.clockDrift?.[key];
  const replaced = sheet.replaced?.[key];
  const gaps = sheet.gaps?.[key];
  const known = sheet.ctErrors?.[key];
  return {
    key,
    ctErrors: eachPhase((phase) =>
      known === undefined ? drawnError(sheet, `${key} ${phase}`) : ctError(...known[phase]),
    ),
    timeFrom: sheet.timeFrom ?? 'satellite',
    ...(loss && { clockLoss: loss }),
    ...(drift && { clockDrift: drift }),
    ...(replaced && { replaced: { ...replaced, error: ctError(...replaced.error) } }),
    ...(gaps && { gaps }),
    missingShare: sheet.missingShare?.[key] ?? 0,
  };
}

const MINUTE_RAD = Math.PI / 180 / 60;
const ctError = (percent: number, minutes: number): CtError => ({
  ratio: percent / 100,
  angleRad: minutes * MINUTE_RAD,
});

/** The equipment is the same whatever the site's seed: the seed decides only the days. */
function drawnError(sheet: LineSheet, place: string): CtError {
  const spread = sheet.ctSpread ?? 0.4;
  const own = seedOf(1, `${sheet.key} ${place}`);
  return ctError(spread * (2 * hashed(own, 1) - 1), 30 * spread * (2 * hashed(own, 2) - 1));
}

function branchOf(stretches: readonly Stretch[], sheet: LineSheet): Branch {
  const sum = (perKm: (stretch: Stretch) => number): number =>
    stretches.reduce((total, stretch) => total + perKm(stretch) * stretch.km, 0);
  const lineReactanceOhm = sum(({ of }) => of.reactanceOhmPerKm);
  return {
    resistanceOhm: sum(({ of }) => of.resistanceOhmPerKm),
    reactanceOhm:
      lineReactanceOhm * (1 - (sheet.seriesCompensation ?? 0)) + (sheet.transformerReactanceOhm ?? 0),
    capacitanceNf: sum(({ of }) => of.capacitanceNfPerKm),
  };
}

const round = (value: number, digits: number): number => Number(value.toFixed(digits));
