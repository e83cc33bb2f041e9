import { compositionSchema } from '../../src/contract/composition';
import type { Cause, StandingVerdict } from '../../src/contract/standing';
import type { Creep } from '../../src/contract/warning';
import type { Store } from '../../src/store/client';
import { line, substation, terminal } from '../../src/store/schema/register';
import { standingVerdict } from '../../src/store/schema/standing';

/** An invented fleet with findings: the same number always gives the same line. */

export const FLEET_AT = '2026-03-02T07:00:00.000Z';
const PLACES = ['Arden', 'Birk', 'Corrin', 'Dunmoor', 'Esk Ford', 'Fallow', 'Garth', 'Holm', 'Inver', 'Kell'];
const VOLTAGES = [110, 220, 380];
const PHASES = ['a', 'b', 'c'] as const;
const ROWS_A_STATEMENT = 250;
const PHASE_KV = 110 / Math.sqrt(3);

/** A number from 0 to 1 that depends on the seed alone. */
function fraction(seed: number): number {
  const turned = Math.sin(seed * 12.9898 + 4.1414) * 43_758.5453;
  return turned - Math.floor(turned);
}

/** The lower voltage’s owner is not recorded. */
export const ownerAt = (voltageKv: number): string | null =>
  voltageKv === 110 ? null : voltageKv === 220 ? 'Holm Networks' : 'Garth & Kell Transmission';

const keyOf = (place: string): string => place.toLowerCase().replaceAll(' ', '-');
const dayAfter = (days: number): string =>
  new Date(Date.parse(FLEET_AT) + days * 86_400_000).toISOString().slice(0, 10);

export interface MadeUpLine {
  readonly name: string;
  readonly key: string;
  readonly ends: readonly [string, string];
  readonly voltageKv: number;
}

export function madeUpLineOf(index: number): MadeUpLine {
  const from = PLACES[index % PLACES.length]!;
  const to = PLACES[(index + 1 + (Math.floor(index / PLACES.length) % (PLACES.length - 1))) % PLACES.length]!;
  const number = Math.floor(index / (PLACES.length * (PLACES.length - 1))) + 1;
  return {
    name: `${from} – ${to} ${number}`,
    key: `${keyOf(from)}-${keyOf(to)}-${number}`,
    ends: [from, to],
    voltageKv: VOLTAGES[index % VOLTAGES.length]!,
  };
}

function creepOf(
  phase: 'a' | 'b' | 'c',
  seed: number,
  levels: { levelAmps: number; pickupAmps: number },
): Creep {
  const { levelAmps, pickupAmps } = levels;
  const slope = 0.4 + 3 * fraction(seed + 0.5);
  const low = slope * 0.8;
  const high = slope * 1.25;
  const date = (perMonth: number, targetAmps: number): string | null => {
    const days = Math.ceil(((targetAmps - levelAmps) / perMonth) * 30.4);
    return days <= 0 ? dayAfter(0) : days > 1826 ? null : dayAfter(days);
  };
  const dates = (target: number) => ({
    earliest: date(high, target),
    likely: date(slope, target),
    latest: date(low, target),
  });
  const near = dates(0.7 * pickupAmps);
  return {
    phase,
    verdict: near.likely !== null && near.likely <= dayAfter(365) ? 'creep' : 'within margin',
    slopeAmpsPerMonth: slope,
    slopeLowAmpsPerMonth: low,
    slopeHighAmpsPerMonth: high,
    pTwoSided: 0.0004,
    days: 60,
    levelNowAmps: levelAmps,
    near,
    pickup: dates(pickupAmps),
  };
}

function composition(
  days: number,
  charging: number,
  ratio: number,
  [against, terminal]: readonly [string, string],
) {
  const estimate = (value: number, half: number) => ({ value, low: value - half, high: value + half });
  return compositionSchema.parse({
    kind: 'separated',
    from: dayAfter(-days - 30),
    to: dayAfter(-days),
    days: 30,
    snapshotCount: 1_200_000,
    polygon: {
      chargingAmps: [0, charging],
      leakageAmps: [0.1, 0],
      ratioAmps: [ratio * 400, 0],
      angleAmps: [0, 1.2],
      restAmps: [0.3, 0.2],
      differentialAmps: [ratio * 400 + 0.4, charging + 1.4],
    },
    chargingAmps: estimate(charging, 0.4),
    expectedChargingAmps: charging,
    leakageAmps: estimate(0.1, 0.3),
    admittance: { leftMillisiemens: [0.1 / PHASE_KV, charging / PHASE_KV], compensatedMillisiemens: 0 },
    mismatches: [
      {
        terminal,
        against,
        ratio: estimate(ratio, 0.002),
        ratioBudget: ratio > 0.02 ? 'beyond' : 'within',
        angleDeg: estimate(0.2, 0.05),
        angleBudget: 'within',
        asymmetryMs: estimate(0.011, 0.003),
      },
    ],
    residualRmsAmps: 0.7,
    condition: 38,
  });
}

/** A phase's findings; every seventh phase rises, a few stand beyond the near mark, every eleventh has no causes. */
export function madeUpVerdict(index: number, phase: 'a' | 'b' | 'c'): StandingVerdict {
  const made = madeUpLineOf(index);
  const seed = index * 3 + PHASES.indexOf(phase);
  const pickupAmps = 60 + 60 * (index % 3);
  const share = 0.06 + 0.74 * fraction(seed) ** 2.2;
  const levelAmps = share * pickupAmps;
  const rises = seed % 7 === 3;
  const creep = rises ? creepOf(phase, seed, { levelAmps, pickupAmps }) : null;
  const charging = levelAmps * (0.2 + 0.6 * fraction(seed + 0.3));
  const ratio = Math.sqrt(Math.max(0, levelAmps ** 2 - charging ** 2)) / 400;
  const separable = seed % 11 !== 5;
  const likelyCause: Cause = !separable ? 'not told' : rises ? 'ratio mismatch' : 'charging';
  const ends = [keyOf(made.ends[0]), keyOf(made.ends[1])] as const;
  return {
    line: made.key,
    phase,
    computedAt: FLEET_AT,
    levelAmps,
    pickupAmps,
    shareOfPickup: share,
    expectedAmps: levelAmps * (0.7 + 0.5 * fraction(seed + 0.7)),
    utilisationP95: Math.min(1, share * 0.8 + 0.05),
    emergencyUtilisation: separable ? Math.min(1.2, share * 1.3) : null,
    composition: separable
      ? composition(0, charging, ratio, ends)
      : {
          kind: 'not separable',
          from: dayAfter(-30),
          to: dayAfter(0),
          days: 30,
          snapshotCount: 900_000,
          reason: 'The load hardly changes in this window.',
        },
    compositionBefore: separable ? composition(60, charging, rises ? ratio * 0.5 : ratio, ends) : null,
    creep,
    creepAtReference: creep === null ? null : { creep, referenceThroughAmps: 400 },
    loadTakenOutBy: separable ? 'composition' : null,
    measuredCounts: !separable && creep !== null,
    loadDependence: null,
    emergencyCreep: null,
    marks: [],
    driftSince: null,
    step: null,
    likelyCause,
    causePlace: likelyCause === 'ratio mismatch' ? { terminal: ends[1], against: null } : null,
    causeIsTime: false,
    near: creep?.near ?? null,
    pickup: creep?.pickup ?? null,
  };
}

const mismatchAmps = ({ composition: found }: StandingVerdict): number | null =>
  found.kind === 'separated' && found.polygon !== null
    ? Math.hypot(found.polygon.ratioAmps[0], found.polygon.angleAmps[1])
    : null;

export function verdictRow(lineId: number, verdict: StandingVerdict): typeof standingVerdict.$inferInsert {
  const { composition: found } = verdict;
  return {
    lineId,
    phase: verdict.phase,
    computedAt: new Date(verdict.computedAt),
    levelAmps: verdict.levelAmps,
    shareOfPickup: verdict.shareOfPickup,
    utilisationP95: verdict.utilisationP95,
    emergencyUtilisation: verdict.emergencyUtilisation,
    chargingAmps: found.kind === 'separated' ? (found.chargingAmps?.value ?? null) : null,
    mismatchAmps: mismatchAmps(verdict),
    restAmps: found.kind === 'separated' ? 0.36 : null,
    creepAmpsPerMonth: verdict.creep?.slopeAmpsPerMonth ?? null,
    creepVerdict: verdict.creep?.verdict ?? null,
    nearEarliest: verdict.near?.earliest ?? null,
    nearLikely: verdict.near?.likely ?? null,
    likelyCause: verdict.likelyCause,
    verdict,
  };
}

/** Puts so many lines with three phases each into the register and the findings; by key, their ids. */
export async function storedFleet(store: Store, lineCount: number): Promise<Map<string, number>> {
  const made = Array.from({ length: lineCount }, (_, index) => madeUpLineOf(index));
  await store.db.insert(substation).values(PLACES.map((name) => ({ key: keyOf(name), name })));
  for (const some of pieces(made))
    await store.db.insert(line).values(
      some.map(({ key, name, voltageKv }) => ({
        key,
        name,
        owner: ownerAt(voltageKv),
        voltageKv,
        ratingAmps: 800,
        emergencyRatingAmps: 960,
        lengthKm: 30,
        kind: 'overhead' as const,
        goesBy: 'phasors' as const,
        inService: true,
        seriesCompensated: false,
      })),
    );
  const ids = new Map(
    (await store.db.select({ key: line.key, id: line.id }).from(line)).map((r) => [r.key, r.id]),
  );
  for (const some of pieces(made))
    await store.db.insert(terminal).values(
      some.flatMap(({ key, ends }) =>
        ends.map((place, position) => ({
          lineId: ids.get(key)!,
          key: keyOf(place),
          position,
          substation: keyOf(place),
          ctPrimaryAmps: 800,
          ctClass: '5P20',
          inService: true,
        })),
      ),
    );
  const rows = made.flatMap(({ key }, index) =>
    PHASES.map((phase) => verdictRow(ids.get(key)!, madeUpVerdict(index, phase))),
  );
  for (const some of pieces(rows)) await store.db.insert(standingVerdict).values(some);
  return ids;
}

const pieces = <Row>(rows: readonly Row[]): Row[][] =>
  Array.from({ length: Math.ceil(rows.length / ROWS_A_STATEMENT) }, (_, piece) =>
    rows.slice(piece * ROWS_A_STATEMENT, (piece + 1) * ROWS_A_STATEMENT),
  );
