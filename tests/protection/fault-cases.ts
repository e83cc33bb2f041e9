import { channelAngleRad } from '../../simulator/plant/channel';
import { type Complex, complex, eachPhase, multiply, polar, type Three } from '../../simulator/plant/complex';
import {
  type Fault,
  faultedLine,
  loadedLine,
  type SourcedLine,
  type TwoEnds,
} from '../../simulator/plant/fault';
import type { Ends, Verdict } from './fault-theory';

/**
 * What can befall a line of 220 kV, 60 km, with about 600 A of load, and what each kind of scheme does about it by
 * theory. Currents come from the plant's fault calculator, verdicts from reasoning that stands beside them.
 */
const NETWORK: SourcedLine = {
  line: { positive: complex(3, 24), zero: complex(12, 72) },
  firstSource: { positive: complex(1, 15), zero: complex(1, 10) },
  secondSource: { positive: complex(1.5, 20), zero: complex(1.5, 15) },
  firstVolts: polar(127_000, 0.28),
  secondVolts: polar(127_000, 0),
};

export const SCHEMES = {
  'two-slope': {
    characteristic: {
      kind: 'two-slope',
      pickupAmps: 150,
      slope1: 0.3,
      kneeAmps: 2000,
      slope2: 0.7,
      slopeStart: 'from-zero',
    },
    restraint: { kind: 'scaled-sum', factor: 0.5 },
  },
  adaptive: {
    characteristic: {
      kind: 'adaptive',
      pickupAmps: 150,
      ctErrors: ['first', 'second'].map((terminal) => ({
        terminal,
        errorBelow: 0.02,
        errorAbove: 0.1,
        limitAmps: 2400,
      })),
      timeErrorMs: 0.1,
    },
    restraint: { kind: 'error-sum' },
  },
  'alpha-plane': {
    characteristic: { kind: 'alpha-plane', pickupAmps: 150, radius: 6, angleDeg: 195 },
    restraint: { kind: 'none' },
  },
  'phase-comparison': {
    characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 200 },
    restraint: { kind: 'none' },
  },
} as const;

export type Kind = keyof typeof SCHEMES;
export const KINDS = Object.keys(SCHEMES) as Kind[];

export interface FaultCase {
  readonly what: string;
  readonly phase: 'a' | 'b' | 'c';
  readonly ends: Ends;
  /** why theory gives these verdicts */
  readonly because: string;
  readonly verdicts: Readonly<Record<Kind, Verdict>>;
}

const PHASE_INDEX = { a: 0, b: 1, c: 2 } as const;

const LOAD = loadedLine(NETWORK);
const DEAD = complex(0, 0);

const all = (verdict: Verdict): FaultCase['verdicts'] => ({
  'two-slope': verdict,
  adaptive: verdict,
  'alpha-plane': verdict,
  'phase-comparison': verdict,
});

const inPhase = (phase: FaultCase['phase'], [first, second]: TwoEnds): Ends => [
  first[PHASE_INDEX[phase]],
  second[PHASE_INDEX[phase]],
];

const at = (fault: Omit<Fault, 'kind'>): TwoEnds =>
  faultedLine(NETWORK, { kind: 'phase A to earth', ...fault });

/** Both ends as transformers of 5P at opposite limits of their class give them. */
const atClassLimits = ([first, second]: TwoEnds): TwoEnds => {
  const sixtyMinutes = Math.PI / 180;
  return [turned(first, polar(1.01, sixtyMinutes)), turned(second, polar(0.99, -sixtyMinutes))];
};
const turned = (currents: Three<Complex>, by: Complex): Three<Complex> =>
  eachPhase((phase) => multiply(currents[phase], by));

/** The second end's time off by half of what sending takes longer than receiving. */
const afterChannelStep = (asymmetryMs: number): TwoEnds => {
  const channel = { path: 'detour', sendMs: 4 + asymmetryMs, receiveMs: 4, lossPpm: 0 };
  return [LOAD[0], turned(LOAD[1], polar(1, channelAngleRad(channel, 50)))];
};

const secondEnd = (change: (currents: Three<Complex>) => Three<Complex>): TwoEnds => [
  LOAD[0],
  change(LOAD[1]),
];

export const FAULT_CASES: readonly FaultCase[] = [
  {
    what: 'load alone',
    phase: 'a',
    ends: inPhase('a', LOAD),
    because: 'what enters leaves: no differential, k = −1, no deviation',
    verdicts: all('restrains'),
  },
  {
    what: 'a through fault with transformers at opposite class limits',
    phase: 'a',
    ends: inPhase(
      'a',
      atClassLimits(
        faultedLine(NETWORK, { kind: 'three-phase', at: 'behind the second end', resistanceOhm: 0 }),
      ),
    ),
    because: 'about 4 % of the through current is left, in a ratio 2 % off −1 and 2° off opposition',
    verdicts: all('restrains'),
  },
  {
    what: 'an internal earth fault without resistance',
    phase: 'a',
    ends: inPhase('a', at({ at: 0.5, resistanceOhm: 0 })),
    because: 'both ends feed kiloamperes nearly in phase',
    verdicts: all('operates'),
  },
  {
    what: 'the sound phase beside that fault',
    phase: 'b',
    ends: inPhase('b', at({ at: 0.5, resistanceOhm: 0 })),
    because: 'what the sources drive through the sound phases leaves at the other end',
    verdicts: all('restrains'),
  },
  {
    what: 'an internal earth fault over 60 Ω',
    phase: 'a',
    ends: inPhase('a', at({ at: 0.5, resistanceOhm: 60 })),
    because: 'about 2 kA: each end’s share is more than the load, so that both feed the fault',
    verdicts: all('operates'),
  },
  {
    what: 'an internal earth fault over 300 Ω',
    phase: 'a',
    ends: inPhase('a', at({ at: 0.5, resistanceOhm: 300 })),
    because:
      'about 0.4 kA, more than pickup and slopes ask for; load still leaves at the far end, near opposition',
    verdicts: {
      'two-slope': 'operates',
      adaptive: 'operates',
      'alpha-plane': 'restrains',
      'phase-comparison': 'restrains',
    },
  },
  {
    what: 'an internal earth fault over 1500 Ω',
    phase: 'a',
    ends: inPhase('a', at({ at: 0.5, resistanceOhm: 1500 })),
    because: 'about 0.08 kA, below every pickup',
    verdicts: all('restrains'),
  },
  {
    what: 'an open conductor',
    phase: 'a',
    ends: [complex(0, 10), complex(0, 10)],
    because: 'each end carries its half of the charging and nothing else, far below pickup and release',
    verdicts: all('restrains'),
  },
  {
    what: 'an open transformer circuit at the second end',
    phase: 'a',
    ends: inPhase(
      'a',
      secondEnd(([, b, c]) => [DEAD, b, c]),
    ),
    because:
      'the whole load is left as differential, in a ratio of zero; without current there is no release',
    verdicts: {
      'two-slope': 'operates',
      adaptive: 'operates',
      'alpha-plane': 'operates',
      'phase-comparison': 'restrains',
    },
  },
  {
    what: 'a reversed transformer at the second end',
    phase: 'a',
    ends: inPhase(
      'a',
      secondEnd((currents) => turned(currents, complex(-1, 0))),
    ),
    because: 'twice the load as differential, in a ratio of +1, in phase',
    verdicts: all('operates'),
  },
  ...(['a', 'b'] as const).map((phase) => ({
    what: 'phases a and b swapped at the second end',
    phase,
    ends: inPhase(
      phase,
      secondEnd(([a, b, c]) => [b, a, c]),
    ),
    because: '√3 times the load as differential; the two currents are 120° off opposition',
    verdicts: all('operates'),
  })),
  {
    what: 'phases a and b swapped at the second end',
    phase: 'c',
    ends: inPhase(
      'c',
      secondEnd(([a, b, c]) => [b, a, c]),
    ),
    because: 'the third phase is as it was',
    verdicts: all('restrains'),
  },
  {
    what: 'a channel step of 1 ms',
    phase: 'a',
    ends: inPhase('a', afterChannelStep(1)),
    because: '9° leave 0.157 of the load',
    verdicts: all('restrains'),
  },
  {
    what: 'a channel step of 5 ms',
    phase: 'a',
    ends: inPhase('a', afterChannelStep(5)),
    because: '45° leave 0.765 of the load; an angle of 97.5° and a tolerance of 60° take it',
    verdicts: {
      'two-slope': 'operates',
      adaptive: 'operates',
      'alpha-plane': 'restrains',
      'phase-comparison': 'restrains',
    },
  },
];
