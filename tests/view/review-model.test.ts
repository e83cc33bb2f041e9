import { describe, expect, it } from 'vitest';
import type { CompositionOnWire } from '../../src/contract/composition';
import { isComputable } from '../../src/protection/evaluation';
import { magnitude, phasor, subtract } from '../../src/protection/phasor';
import type { MismatchBasis } from '../../src/view/review-basis';
import { reviewCompositions } from '../../src/view/review-composition';
import { reviewLoadability } from '../../src/view/review-margins';
import { reviewModel } from '../../src/view/review-model';
import { reviewSnapshot } from '../../src/view/review-now';
import { phaseSentences } from '../../src/view/review-phase-words';
import { estimate, mismatchWith, notSeparable, separatedWith, verdictWith } from './sample-compositions';
import { SITE } from './sample-lines';
import { NO_COMPOSITIONS, reviewLine, terminalSaying, TWO_SLOPE } from './sample-review';

const line = reviewLine();
const susceptanceMs = (2 * Math.PI * 50 * 9 * 71) / 1e6;
/** charging of the whole line leads the voltage by 90° and stands in terminal 1 alone here */
const chargingAmps = (susceptanceMs * 110) / Math.sqrt(3);
const LOADED = [terminalSaying('skelder', [400, 0]), terminalSaying('hask', [400, 180])];
const UNLOADED = [terminalSaying('skelder', [60, 0]), terminalSaying('hask', [60, 180])];
const MUTE = LOADED.map((each) => ({ ...each, voltage: null }));

const given = (composition: CompositionOnWire | undefined) => ({
  line,
  recorded: TWO_SLOPE,
  snapshot: reviewSnapshot(line, TWO_SLOPE, LOADED),
  compositions: { ...NO_COMPOSITIONS, b: composition },
});
const input = given(separatedWith());
type Input = Parameters<typeof reviewModel>[0];

function model(from: Input, basis: MismatchBasis = 'composition') {
  const found = reviewModel(from, { phase: 'b', basis });
  if (!isComputable(found)) throw new Error(found.notComputable);
  return found;
}

/** Measured by a ratio alone, at terminals that charging leaves alone. */
const pureRatio = (...others: readonly (readonly [string, number])[]) =>
  separatedWith({
    admittance: { leftMillisiemens: [0, 0], compensatedMillisiemens: 0 },
    mismatches: others.map(([terminal, ratio]) =>
      mismatchWith({ terminal, ratio: estimate(ratio, 0.001), angleDeg: estimate(0, 0.01) }),
    ),
  });

function atEmergency(from: Parameters<typeof reviewLoadability>[0]) {
  const { b } = reviewLoadability(from, { basis: 'composition', lagDeg: 30 });
  if (!isComputable(b)) throw new Error(b.notComputable);
  return b.atEmergency;
}

describe('a prediction by the last 30 days’ composition', () => {
  it('takes charging, leakage and mismatch as measured, and says from which days', () => {
    const found = model(input);
    expect(found).toMatchObject({ basis: 'composition', obstacles: [] });
    expect(found.model).toMatchObject({
      basis: 'measured',
      admittanceMillisiemens: phasor(0.0016, 0.2204),
    });
    expect(found.words).toBe(
      'Mismatches and charging measured: the last 30 days’ composition, 1 Nov 2026 to 1 Dec 2026, 30 days with qualified snapshots.',
    );
  });

  it('says so where a mark has parted those days', () => {
    expect(model(given(separatedWith({ from: '2026-11-23', days: 8 }))).words).toContain(
      'composition, since the last known mark only, 23 Nov 2026 to 1 Dec 2026, 8 days with',
    );
  });

  it('of a terminal that measures a twentieth more leaves a twenty-first of the load', () => {
    const point = atEmergency(given(pureRatio(['hask', 0.05])));
    expect(point.differentialAmps).toBeCloseTo(960 / 21, 9);
    // restraint: half of 960 A and of a twenty-first less; threshold: 140 A up to the knee, then 0.6 of the rest
    const restraintAmps = 0.5 * (960 + (960 * 20) / 21);
    expect(point.restraintAmps).toBeCloseTo(restraintAmps, 9);
    expect(point.utilisation).toBeCloseTo(960 / 21 / (140 + 0.6 * (restraintAmps - 700)), 9);
  });

  it('of three terminals takes the mismatch of each, in the register’s order', () => {
    const tee = reviewLine({
      terminals: ['skelder', 'hask', 'mill'].map((key, position) => ({
        ...line.terminals[0]!,
        key,
        position,
        substation: key,
      })),
    });
    const sent = [...LOADED, terminalSaying('mill', [0, 0])];
    const from = {
      ...given(pureRatio(['mill', 0.02], ['hask', 0.05])),
      line: tee,
      snapshot: reviewSnapshot(tee, TWO_SLOPE, sent),
    };
    const found = model(from);
    expect(found.basis).toBe('composition');
    expect(found.model.mismatchSets[0]?.map(({ re }) => re)).toEqual([
      expect.closeTo(1 / 21, 12),
      expect.closeTo(1 / 51, 12),
    ]);
    const point = atEmergency(from);
    // each takes half of what enters at the first
    expect(point.differentialAmps).toBeCloseTo(480 / 21 + 480 / 51, 9);
  });

  it('needs neither line constants nor classes', () => {
    const bare = reviewLine({
      capacitanceNfPerKm: null,
      terminals: line.terminals.map((each) => ({ ...each, ctClass: '' })),
    });
    expect(model({ ...input, line: bare }).basis).toBe('composition');
  });

  it('does not take out twice what the scheme compensates', () => {
    const left = { leftMillisiemens: [0, 0.01] as [number, number], compensatedMillisiemens: susceptanceMs };
    const found = model({
      ...given(separatedWith({ admittance: left })),
      recorded: { chargingCompensation: true },
    });
    expect(found.model.admittanceMillisiemens.im).toBeCloseTo(0.01, 12);
  });

  it('has the charging as the settings of now leave it, where they compensate otherwise than those days', () => {
    const left = { leftMillisiemens: [0, 0.01] as [number, number], compensatedMillisiemens: susceptanceMs };
    const since = model(given(separatedWith({ admittance: left })));
    expect(since.model.admittanceMillisiemens.im).toBeCloseTo(0.01 + susceptanceMs, 12);
    const before = model({ ...input, recorded: { chargingCompensation: true } });
    expect(before.model.admittanceMillisiemens.im).toBeCloseTo(0.2204 - susceptanceMs, 12);
  });

  it('says so where the charging is taken as compensated while it is not just now', () => {
    const recorded = { chargingCompensation: true };
    const snapshot = reviewSnapshot(line, recorded, MUTE);
    expect(model({ ...input, recorded, snapshot }).words).toContain(
      'Charging is taken as compensated, though just now it is not.',
    );
  });

  it('is that of the phase’s own newest verdict', () => {
    const standing = [verdictWith({ phase: 'c', composition: notSeparable }), verdictWith({ phase: 'b' })];
    expect(reviewCompositions(standing)).toEqual({ a: undefined, b: separatedWith(), c: notSeparable });
  });
});

describe('where there is no composition for it', () => {
  it.each([
    ['before the first look', undefined, 'the standing level of this phase has not been looked at'],
    [
      'where it is not separable',
      notSeparable,
      'The last 30 days’ composition is not separable. Four days can’t be told from chance; seven are needed.',
    ],
    [
      'where it was kept without its admittance',
      separatedWith({ admittance: undefined }),
      'The newest composition was kept without what a prediction needs.',
    ],
    [
      'where it is of a terminal that is no longer in service',
      pureRatio(['hask', 0.05], ['mill', 0.02]),
      'The last 30 days’ composition is of other terminals than those that the register now has in service.',
    ],
    [
      'where it is measured against another first terminal',
      separatedWith({ mismatches: [mismatchWith({ terminal: 'skelder', against: 'hask' })] }),
      'The last 30 days’ composition is of other terminals',
    ],
  ])('%s the present snapshot stands in, and it is said why', (_name, composition, why) => {
    const found = model(given(composition));
    expect(found.basis).toBe('snapshot');
    expect(found.words).toBe(
      'Mismatch of the two ends measured in the present snapshot, charging by line constants.',
    );
    expect(found.obstacles).toEqual([expect.stringContaining(why)]);
  });

  it('nor a snapshot that tells, class limits stand in with both reasons', () => {
    const snapshot = reviewSnapshot(line, TWO_SLOPE, UNLOADED);
    const found = model({ ...given(notSeparable), snapshot });
    expect(found.basis).toBe('class limits');
    expect(found.words).toBe('Mismatches from the transformers’ classes at opposite limits, not measured.');
    expect(found.obstacles).toEqual([
      'The last 30 days’ composition is not separable. Four days can’t be told from chance; seven are needed.',
      'The present snapshot does not tell the mismatches: the line carries under 20 % of its rating now.',
    ]);
  });

  it('because the line goes by reported magnitudes, that is said once', () => {
    const reported = reviewLine({ goesBy: 'reported' });
    const snapshot = reviewSnapshot(reported, TWO_SLOPE, LOADED);
    const found = model({ ...given(notSeparable), line: reported, snapshot });
    expect(found.basis).toBe('class limits');
    expect(found.obstacles).toEqual([
      'This line goes by reported magnitudes, by which the mismatches can’t be measured.',
    ]);
  });

  it('nor constants for the other two, every reason is said once', () => {
    const bare = reviewLine({ capacitanceNfPerKm: null });
    const found = reviewModel({ ...given(notSeparable), line: bare }, { phase: 'b', basis: 'composition' });
    expect(found).toEqual({
      notComputable:
        'The last 30 days’ composition is not separable. Four days can’t be told from chance; seven are needed. The register does not hold the line’s capacitance, so its charging current can’t be told.',
    });
  });
});

describe('a prediction by the present snapshot', () => {
  it('of a loaded line of two terminals with voltages has their mismatch', () => {
    const found = model(input, 'snapshot');
    expect(found).toMatchObject({ basis: 'snapshot', obstacles: [] });
    // nothing is left over, though charging should be: the mismatch has to account for just that
    const [[mismatch]] = found.model.mismatchSets as [[{ re: number; im: number }]];
    expect(Math.hypot(mismatch.re, mismatch.im)).toBeCloseTo(chargingAmps / 400, 6);
  });

  it.each([
    ['without voltages', MUTE, 'no terminal gives a valid voltage'],
    ['under little load', UNLOADED, 'the line carries under 20 % of its rating now'],
    ['without a snapshot', [], 'there is no snapshot with phasors of all ends now'],
  ])('%s has class limits in its place, and it is said why', (_name, sent, why) => {
    const found = model({ ...input, snapshot: reviewSnapshot(line, TWO_SLOPE, sent) }, 'snapshot');
    expect(found.basis).toBe('class limits');
    expect(found.obstacles).toEqual([expect.stringContaining(why)]);
  });

  it('of three terminals has class limits in its place', () => {
    const tee = reviewLine({
      terminals: [...line.terminals, { ...line.terminals[0]!, key: 'mill', position: 2 }],
    });
    const sent = [...LOADED, terminalSaying('mill', [300, 0])];
    const found = model({ ...input, line: tee, snapshot: reviewSnapshot(tee, TWO_SLOPE, sent) }, 'snapshot');
    expect(found.basis).toBe('class limits');
    expect(found.obstacles).toEqual([
      expect.stringContaining('one snapshot can’t part the mismatches of 3 terminals'),
    ]);
  });
});

describe('a prediction by class limits', () => {
  it('is not measured, and says no more than that', () => {
    expect(model(input, 'class limits')).toMatchObject({
      words: 'Mismatches from the transformers’ classes at opposite limits, not measured.',
      obstacles: [],
    });
  });

  it('has charging by line constants, less what the scheme compensates and not just now falls back on', () => {
    const recorded = { chargingCompensation: true };
    const of = (sent: typeof LOADED) =>
      model({ ...input, recorded, snapshot: reviewSnapshot(line, recorded, sent) }, 'class limits').model
        .admittanceMillisiemens;
    expect(magnitude(of(LOADED))).toBe(0);
    expect(magnitude(subtract(of(MUTE), phasor(0, susceptanceMs)))).toBeLessThan(1e-12);
  });

  it('is none for a terminal without a class, which is named', () => {
    const unknown = reviewLine({ terminals: line.terminals.map((each) => ({ ...each, ctClass: '' })) });
    const found = reviewModel({ ...input, line: unknown }, { phase: 'b', basis: 'class limits' });
    expect(found).toMatchObject({ notComputable: expect.stringContaining('at Skelder and Hask') as string });
  });

  it('is none of a single terminal', () => {
    const single = reviewLine({ terminals: line.terminals.slice(0, 1) });
    expect(reviewModel({ ...input, line: single }, { phase: 'b', basis: 'class limits' })).toEqual({
      notComputable: 'A through current needs two terminals in service.',
    });
  });
});

describe('what the phases rest on', () => {
  const letters = SITE.phaseLetters;

  it('is said once where it is the same for all', () => {
    expect(phaseSentences(() => 'Measured.', letters)).toEqual(['Measured.']);
  });

  it('is said with whose it is where it differs', () => {
    expect(phaseSentences((phase) => (phase === 'b' ? 'Measured.' : 'Not measured.'), letters)).toEqual([
      'Phases L1 and L3: Not measured.',
      'Phase L2: Measured.',
    ]);
  });

  it('is said with whose it is where some have nothing to say', () => {
    expect(phaseSentences((phase) => (phase === 'a' ? 'Measured.' : undefined), letters)).toEqual([
      'Phase L1: Measured.',
    ]);
  });
});
