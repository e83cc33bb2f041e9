import { describe, expect, it } from 'vitest';
import type { RegisterLine } from '../../src/contract/register';
import type { SettingsVersion } from '../../src/contract/settings-version';
import { chargingExample } from '../../src/view/register-charging';
import { characteristicDrawing, settingsTyped } from '../../src/view/register-drawing';
import {
  registerCounts,
  registerListAddress,
  registerListState,
  registerRows,
} from '../../src/view/register-list';
import { characteristicText, hindrances } from '../../src/view/register-words';
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

describe('the expected charging current', () => {
  it('is worked through with the line’s figures', () => {
    // 2π · 50 Hz · 8.9 nF/km · 42.5 km · 220 kV/√3 = 15.09 A
    const example = chargingExample(line(), 120)!;
    const plain = (text: string) => text.replaceAll(/\s/g, ' ');
    expect([example.total, example.perEnd].map(plain)).toEqual(['15 A', '7.5 A']);
    expect(example.susceptance).toBe('2.80 µS/km');
    expect(chargingExample(line(), 120)?.ofPickup).toBeCloseTo(0.1258, 3);
  });

  it('cannot be told without the capacitance', () => {
    expect(chargingExample(line({ capacitanceNfPerKm: null }), 120)).toBeUndefined();
  });
});

describe('a characteristic', () => {
  const typed = { pickupAmps: '120', slope1: '30', kneeAmps: '1500', slope2: '60', slopeStart: 'from-zero' };
  const box = { width: 200, height: 100, left: 0, bottom: 0 };

  it('is drawn from the pickup through corner and knee', () => {
    const drawing = characteristicDrawing(settingsTyped(typed), box);
    expect(drawing?.threshold).toHaveLength(4);
    expect(drawing?.threshold[0]).toEqual([0, drawing?.pickupY]);
    expect(drawing?.kneeX).toBeCloseTo(125);
  });

  it('is not drawn while its figures are not possible', () => {
    expect(characteristicDrawing(settingsTyped({ ...typed, slope2: '10' }), box)).toBeUndefined();
    expect(characteristicDrawing(settingsTyped({ ...typed, pickupAmps: '' }), box)).toBeUndefined();
  });

  it('is put in words with its convention', () => {
    expect(characteristicText(version).replaceAll(/\s/g, ' ')).toBe(
      'pickup 120 A · 30 % aimed at zero up to 1500 A, then 60 %',
    );
  });
});
