import type { Complex } from '../../src/standing/complex';
import { addSnapshot, emptySums } from '../../src/standing/composition-sums';
import type { CompositionSnapshot, CompositionSums } from '../../src/standing/composition-sums';

export const polar = (size: number, angleRad: number): Complex => ({
  re: size * Math.cos(angleRad),
  im: size * Math.sin(angleRad),
});

/** What is so with a made-up phase without noise; currents flow in at the first terminal, out at the others. */
export interface PhaseTruth {
  readonly susceptanceMillisiemens: number;
  readonly conductanceMillisiemens?: number;
  /** e of every terminal but the first. */
  readonly mismatches: readonly Complex[];
}

/** A snapshot of the phase; `shares` says how the through current leaves by the other terminals. */
export function snapshotOf(
  truth: PhaseTruth,
  load: {
    readonly voltageKv: number;
    readonly throughAmps: number;
    readonly lagRad: number;
    readonly shares?: readonly number[];
    readonly turnRad?: number;
  },
): CompositionSnapshot {
  const turn = load.turnRad ?? 0;
  const voltageKv = polar(load.voltageKv, turn);
  const first = polar(load.throughAmps, turn - load.lagRad);
  const y = { re: truth.conductanceMillisiemens ?? 0, im: truth.susceptanceMillisiemens };
  const charging = product(y, voltageKv);
  const out = { re: charging.re - first.re, im: charging.im - first.im };
  const shares = load.shares ?? [1];
  const otherCurrentsAmps = truth.mismatches.map((e, index) =>
    product({ re: (1 + e.re) * shares[index]!, im: e.im * shares[index]! }, out),
  );
  const differentialAmps = otherCurrentsAmps.reduce(
    (total, { re, im }) => ({ re: total.re + re, im: total.im + im }),
    first,
  );
  return { differentialAmps, voltageKv, otherCurrentsAmps, throughAmps: load.throughAmps };
}

const product = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});

/** Every phasor of the snapshot turned by an angle and times a factor. */
export function turned(snapshot: CompositionSnapshot, angleRad: number, factor = 1): CompositionSnapshot {
  const turn = (each: Complex): Complex => product(polar(factor, angleRad), each);
  return {
    differentialAmps: turn(snapshot.differentialAmps),
    voltageKv: snapshot.voltageKv && turn(snapshot.voltageKv),
    otherCurrentsAmps: snapshot.otherCurrentsAmps.map(turn),
    throughAmps: snapshot.throughAmps * factor,
  };
}

/** Sums of the snapshots, with a voltage unless said. */
export function sumsOf(
  snapshots: readonly CompositionSnapshot[],
  { hasVoltage }: { readonly hasVoltage: boolean } = { hasVoltage: true },
): CompositionSums {
  const terminalCount = 1 + (snapshots[0]?.otherCurrentsAmps.length ?? 1);
  const sums = emptySums({ terminalCount, hasVoltage });
  for (const snapshot of snapshots) addSnapshot(sums, snapshot);
  return sums;
}

/** Snapshots of one day, one an hour, with a load cycle that differs a little from day to day. */
export function dayOf(
  truth: PhaseTruth,
  day: number,
  change: { readonly meanAmps?: number; readonly swingAmps?: number; readonly shareSwing?: number } = {},
): CompositionSnapshot[] {
  const { meanAmps = 300, swingAmps = 150, shareSwing = 0.2 } = change;
  return Array.from({ length: 24 }, (_, hour) => {
    const wave = Math.sin((2 * Math.PI * hour) / 24 + day / 3);
    const second = 0.5 + shareSwing * Math.cos(hour + day);
    return snapshotOf(truth, {
      voltageKv: 63.5 * (1 + 0.01 * Math.sin(hour * 1.7 + day)),
      throughAmps: meanAmps + swingAmps * wave,
      lagRad: 0.2 + 0.1 * Math.cos(hour / 5 + day),
      shares: truth.mismatches.length === 1 ? [1] : [second, 1 - second],
      turnRad: hour * 2.1 + day,
    });
  });
}
