import type { CtError, LineTruth, TerminalTruth } from '../plant/truth';

/**
 * What was injected into one phase of a line, for whoever checks what Tareline found: nothing of Tareline reads it.
 * Amperes are those of the injected phasor at the line's mean load and nominal voltage; as it adds to others at an
 * angle, the level moves by no more than that.
 */
export type ToldTruth = {
  readonly line: string;
  readonly phase: 'a' | 'b' | 'c';
  /** null where nothing happens but load */
  readonly cause: 'ratio mismatch' | 'angle mismatch' | 'charging' | null;
  readonly terminal: string | null;
  readonly slopeAmpsPerMonth: number | null;
  readonly from: string | null;
  readonly stepAt: string | null;
  readonly stepAmps: number | null;
  readonly loadGrowthPerYear: number;
  readonly yearlySwing: number;
  readonly gaps: readonly { readonly terminal: string; readonly from: string; readonly to: string }[];
};

type Cause = Pick<ToldTruth, 'cause' | 'terminal' | 'slopeAmpsPerMonth' | 'from' | 'stepAt' | 'stepAmps'>;
type Place = { readonly truth: LineTruth; readonly phase: 0 | 1 | 2; readonly epochMs: number };

const DAY_MS = 86_400_000;
const MONTH_DAYS = 365.25 / 12;
const OMEGA = 2 * Math.PI * 50;
const NAMES = ['a', 'b', 'c'] as const;
const NOTHING: Cause = {
  cause: null,
  terminal: null,
  slopeAmpsPerMonth: null,
  from: null,
  stepAt: null,
  stepAmps: null,
};

/** The truth of every phase of these lines. */
export function toldTruths(truths: readonly LineTruth[], epochMs: number): readonly ToldTruth[] {
  return truths.flatMap((truth) =>
    ([0, 1, 2] as const).map((phase) => ({
      line: truth.key,
      phase: NAMES[phase],
      ...causeOf({ truth, phase, epochMs }),
      loadGrowthPerYear: truth.load.growthPerYear ?? 0,
      yearlySwing: truth.load.yearlySwing ?? 0,
      gaps: truth.terminals.flatMap(({ key, gaps = [] }) =>
        gaps.map(({ fromDay, toDay }) => ({
          terminal: key,
          from: instant(epochMs, fromDay),
          to: instant(epochMs, toDay),
        })),
      ),
    })),
  );
}

function causeOf(place: Place): Cause {
  const replaced = place.truth.terminals.find((terminal) => terminal.replaced?.phase === place.phase);
  if (replaced !== undefined) return replacement(place, replaced);
  return drift(place) ?? channelStep(place) ?? NOTHING;
}

function drift({ truth, phase, epochMs }: Place): Cause | undefined {
  const { ratioDrift, capacitanceDrift, terminals } = truth;
  const slope = (cause: Cause['cause'], of: { fromDay: number; ampsPerDay: number; terminal?: string }) => ({
    ...NOTHING,
    cause,
    terminal: of.terminal ?? null,
    slopeAmpsPerMonth: Math.abs(of.ampsPerDay) * MONTH_DAYS,
    from: instant(epochMs, of.fromDay),
  });
  if (ratioDrift?.phase === phase)
    return slope('ratio mismatch', { ...ratioDrift, ampsPerDay: ratioDrift.perDay * meanAmps(truth) });
  if (capacitanceDrift?.phase === phase)
    return slope('charging', {
      ...capacitanceDrift,
      ampsPerDay: capacitanceDrift.perDay * chargingAmps(truth),
    });
  const clock = terminals.find(({ clockDrift }) => clockDrift !== undefined);
  if (clock?.clockDrift === undefined) return undefined;
  const ampsPerDay = clock.clockDrift.perDay * 1e-6 * OMEGA * meanAmps(truth);
  return slope('angle mismatch', { ...clock.clockDrift, ampsPerDay, terminal: clock.key });
}

function replacement({ truth, phase, epochMs }: Place, terminal: TerminalTruth): Cause {
  const { error, atDay } = terminal.replaced!;
  const moved = difference(error, terminal.ctErrors[phase]);
  return {
    ...NOTHING,
    cause: Math.abs(moved.ratio) >= Math.abs(moved.angleRad) ? 'ratio mismatch' : 'angle mismatch',
    terminal: terminal.key,
    stepAt: instant(epochMs, atDay),
    stepAmps: Math.hypot(moved.ratio, moved.angleRad) * meanAmps(truth),
  };
}

/** Halving the round trip, a terminal is off by half of what the two directions differ. */
function channelStep({ truth, epochMs }: Place): Cause | undefined {
  const { usual, change } = truth.channel;
  if (change === undefined) return undefined;
  const offMs = Math.abs(change.to.asymmetryMs - usual.asymmetryMs) / 2;
  return {
    ...NOTHING,
    cause: 'angle mismatch',
    terminal: truth.terminals[1]!.key,
    stepAt: instant(epochMs, change.atDay),
    stepAmps: offMs * 1e-3 * OMEGA * meanAmps(truth),
  };
}

const difference = (now: CtError, before: CtError): CtError => ({
  ratio: now.ratio - before.ratio,
  angleRad: now.angleRad - before.angleRad,
});

const meanAmps = ({ ratingAmps, load }: LineTruth): number => ratingAmps * load.meanShare;

const chargingAmps = ({ branches, voltageKv }: LineTruth): number =>
  (OMEGA * branches.reduce((sum, { capacitanceNf }) => sum + capacitanceNf, 0) * 1e-9 * (voltageKv * 1000)) /
  Math.sqrt(3);

const instant = (epochMs: number, day: number): string => new Date(epochMs + day * DAY_MS).toISOString();
