import { describe, expect, it } from 'vitest';
import type { RegisterLine } from '../../src/contract/register';
import type { SettingsVersion } from '../../src/contract/settings-version';
import { chargingExample } from '../../src/view/register-charging';
import type { Characteristic } from '../../src/protection/characteristic';
import { schemeDrawing } from '../../src/view/register-drawing';
import {
  registerCounts,
  registerListAddress,
  registerListState,
  registerRows,
} from '../../src/view/register-list';
import { lineTyped } from '../../src/view/register-standing';
import { lineFromTyped } from '../../src/view/register-typed';
import { characteristicText, hindrances, lineFactsText } from '../../src/view/register-words';
import { newLine, settingsSent } from './made-up-line';

const version = {
  id: 1,
  recordedBy: 'Mira Holt',
  recordedAt: '2026-03-01T10:00:00.000Z',
  ...settingsSent(),
} as unknown as SettingsVersion;

function line(change: Partial<RegisterLine> = {}): RegisterLine {
  const { terminals, ...entry } = newLine();
  return {
    ...entry,
    terminals: terminals.map((one, position) => ({ ...one, position })),
    settings: [version],
    ...change,
  };
}
const listed = [
  { line: line({ key: 'a', name: 'Arden – Birk' }), inForce: version },
  {
    line: line({ key: 'c', name: 'Corl – Dorn', voltageKv: 110, kind: 'cable', settings: [] }),
    inForce: undefined,
  },
  { line: line({ key: 'b', name: 'Birk – Corl', voltageKv: 380 }), inForce: version },
];
const usual = registerListState(new URLSearchParams());
const keys = (query: string) =>
  registerRows(listed, registerListState(new URLSearchParams(query)), 'UTC').map(({ key }) => key);

describe('the list of lines', () => {
  it('sorts by what the address says, both ways', () => {
    expect(keys('')).toEqual(['a', 'b', 'c']);
    expect(keys('sort=-voltage')).toEqual(['b', 'a', 'c']);
    expect(keys('sort=settings')[0]).toBe('c');
  });

  it('finds by name, key, substation, voltage and kind', () => {
    expect(keys('q=corl')).toEqual(['b', 'c']);
    expect(keys('q=cable 110')).toEqual(['c']);
    expect(keys('q=380kv')).toEqual(['b']);
    expect(keys('settings=none')).toEqual(['c']);
  });

  it('never says that a line without settings is well', () => {
    expect(registerRows(listed, usual, 'UTC')[2]?.settings).toBeUndefined();
    expect(registerCounts(listed)).toEqual({
      registered: '3 lines are registered',
      withoutSettings: 'One has no settings in force',
    });
    expect(hindrances(listed[1]!.line, undefined)).toEqual([
      'No settings are recorded, so the line is not evaluated.',
    ]);
  });

  it('keeps its state in the address and leaves out what is as usual', () => {
    expect(registerListAddress(usual)).toBe('/register');
    const address = registerListAddress(usual, { search: 'corl', sort: 'length', descending: true });
    expect(address).toBe('/register?q=corl&sort=-length');
    expect(registerListState(new URLSearchParams(address.split('?')[1]))).toMatchObject({
      sort: 'length',
      descending: true,
    });
  });
});

describe('the owner of a line', () => {
  const owned = [
    { line: line({ key: 'a', name: 'A', owner: 'Tarnside Transmission' }), inForce: version },
    { line: line({ key: 'b', name: 'B' }), inForce: version },
    { line: line({ key: 'c', name: 'C', owner: 'Pellwater Networks' }), inForce: version },
  ];
  const found = (query: string) =>
    registerRows(owned, registerListState(new URLSearchParams(query)), 'UTC').map(({ key, owner }) => [
      key,
      owner,
    ]);

  it('is listed, searched and sorted by, a line without one first', () => {
    expect(found('sort=owner')).toEqual([
      ['b', undefined],
      ['c', 'Pellwater Networks'],
      ['a', 'Tarnside Transmission'],
    ]);
    expect(found('sort=-owner').map(([key]) => key)).toEqual(['a', 'c', 'b']);
    expect(found('q=pellwater').map(([key]) => key)).toEqual(['c']);
  });

  it('stands among the facts where it is recorded', () => {
    expect(lineFactsText(owned[0]!.line)).toMatch(/ · two terminals · of Tarnside Transmission$/);
    expect(lineFactsText(owned[1]!.line)).toMatch(/ · two terminals$/);
  });

  it('comes back from the form as it went in', () => {
    for (const { line: one } of owned)
      expect(lineFromTyped(lineTyped(one))).toMatchObject({ value: { owner: one.owner }, problems: [] });
  });
});

describe('the expected charging current', () => {
  const inForce = {
    characteristic: {
      kind: 'two-slope',
      pickupAmps: 120,
      slope1: 0.3,
      kneeAmps: 900,
      slope2: 0.6,
      slopeStart: 'from-zero',
    },
  } as const;
  const place = { inForce, frequencyHz: 50 };

  it('is worked through with the line’s figures', () => {
    // 2π · 50 Hz · 8.9 nF/km · 42.5 km · 220 kV/√3 = 15.09 A
    const example = chargingExample(line(), place)!;
    const plain = (text: string) => text.replaceAll(/\s/g, ' ');
    expect([example.total, example.perEnd].map(plain)).toEqual(['15 A', '7.5 A']);
    expect(example.susceptance).toBe('2.80 µS/km');
    expect(chargingExample(line(), place)?.ofPickup).toBeCloseTo(0.1258, 3);
  });

  it('cannot be told without the capacitance', () => {
    expect(chargingExample(line({ capacitanceNfPerKm: null }), place)).toBeUndefined();
  });
});

const twoSlope: Characteristic = {
  kind: 'two-slope',
  pickupAmps: 120,
  slope1: 0.3,
  kneeAmps: 1500,
  slope2: 0.6,
  slopeStart: 'from-zero',
};
const alpha: Characteristic = { kind: 'alpha-plane', pickupAmps: 100, radius: 5, angleDeg: 180 };

describe('a characteristic', () => {
  const box = { width: 200, height: 100, left: 0, bottom: 0 };

  it('with a threshold is drawn from the pickup through corner and knee', () => {
    const drawing = schemeDrawing([twoSlope], box);
    if (drawing?.kind !== 'threshold') throw new Error('A two-slope characteristic has a threshold.');
    expect(drawing.curves[0]?.points).toHaveLength(4);
    expect(drawing.curves[0]?.points[0]).toEqual([0, drawing.curves[0]?.pickupY]);
    expect(drawing.curves[0]?.kneeX).toBeCloseTo(125);
  });

  it('with a region is drawn between the radius and its inverse, around 180°', () => {
    const drawing = schemeDrawing([alpha], box);
    if (drawing?.kind !== 'alpha-plane') throw new Error('An alpha plane has a region.');
    const [centreX, centreY] = drawing.centre;
    const distances = drawing.regions[0]!.points.map(([x, y]) => Math.hypot(x - centreX, y - centreY));
    expect(Math.max(...distances)).toBeCloseTo(5 * drawing.unit);
    expect(Math.min(...distances)).toBeCloseTo(drawing.unit / 5);
    expect(drawing.regions[0]!.points.every(([x]) => x <= centreX + 1e-9)).toBe(true);
  });

  it('is laid over another of its kind in one frame, and over none of another kind', () => {
    const higher = { ...twoSlope, pickupAmps: 240, kneeAmps: 3000 };
    const both = schemeDrawing([twoSlope, higher], box);
    if (both?.kind !== 'threshold') throw new Error('Both have thresholds.');
    expect(both.curves[0]!.pickupY).toBeGreaterThan(both.curves[1]!.pickupY);
    expect(schemeDrawing([twoSlope, alpha], box)).toBeUndefined();
    const errors = { terminal: 'arden', errorBelow: 0.01, errorAbove: 0.05, limitAmps: 2400 };
    const adaptive = { kind: 'adaptive', pickupAmps: 100, ctErrors: [errors], timeErrorMs: 0 } as const;
    expect(schemeDrawing([adaptive], box)?.kind).toBe('threshold');
    expect(schemeDrawing([twoSlope, adaptive], box)).toBeUndefined();
  });

  it('is not drawn while its figures are not possible', () => {
    expect(schemeDrawing([{ ...twoSlope, slope2: 0.1 }], box)).toBeUndefined();
    expect(schemeDrawing([{ ...twoSlope, pickupAmps: Number.NaN }], box)).toBeUndefined();
    expect(schemeDrawing([], box)).toBeUndefined();
  });

  it('is put in words with its convention', () => {
    expect(characteristicText(version).replaceAll(/\s/g, ' ')).toBe(
      'pickup 120 A · 30 % aimed at zero up to 1500 A, then 60 %',
    );
  });
});
