import type { ExpectedLevels } from './review-expected';
import { PHASES } from './phase';
import type { PhaseName } from './phase';

/** One lane of the strip, all as shares of its width. */
export interface ExpectedLane {
  readonly phase: PhaseName;
  /** from the least that must be left to the worst case; undefined while a cause is missing */
  readonly band: { readonly from: number; readonly to: number } | undefined;
  readonly independent: number | undefined;
  readonly measured: number | undefined;
}

export interface ExpectedStripShape {
  readonly mostAmps: number;
  readonly lanes: readonly ExpectedLane[];
}

const NICE = [1, 1.5, 2, 3, 4, 5, 6, 8, 10];

/** Expected bands and measured levels of the three phases on one scale from zero. */
export function expectedStrip({ phases }: Pick<ExpectedLevels, 'phases'>): ExpectedStripShape {
  const levels = PHASES.map((phase) => phases[phase]);
  const greatest = Math.max(
    0,
    ...levels.flatMap(({ expected, measuredAmps }) => [expected.worstCaseAmps ?? 0, measuredAmps ?? 0]),
  );
  const mostAmps = roundEnd(1.1 * greatest);
  const share = (amps: number | null | undefined) =>
    amps === null || amps === undefined ? undefined : amps / mostAmps;
  return {
    mostAmps,
    lanes: PHASES.map((phase) => {
      const { expected, measuredAmps } = phases[phase];
      const [from, to] = [share(expected.leastAmps), share(expected.worstCaseAmps)];
      return {
        phase,
        band: from === undefined || to === undefined ? undefined : { from, to },
        independent: share(expected.rootSumSquareAmps),
        measured: share(measuredAmps),
      };
    }),
  };
}

/** A round end of a scale at or above a value. */
export function roundEnd(value: number): number {
  if (!(value > 0)) return 1;
  const decade = 10 ** Math.floor(Math.log10(value));
  return (NICE.find((step) => step * decade >= value * (1 - 1e-9)) ?? 10) * decade;
}
