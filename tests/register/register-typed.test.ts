import { describe, expect, it } from 'vitest';
import { newLineSchema, newSettingsVersionSchema, newTerminalSchema } from '../../src/contract/register';
import { typedInstant, wallTimeTyped } from '../../src/view/register-instant';
import {
  lineFromTyped,
  problemsByField,
  settingsFromTyped,
  terminalFromTyped,
} from '../../src/view/register-typed';

const ZONE = 'Europe/Berlin';

describe('a wall time', () => {
  it('means an instant in the site’s zone, in winter and in summer', () => {
    expect(typedInstant('2026-03-01T10:00', ZONE)).toEqual({ ok: true, iso: '2026-03-01T09:00:00.000Z' });
    expect(typedInstant('2026-07-01 10:00:30', ZONE)).toEqual({ ok: true, iso: '2026-07-01T08:00:30.000Z' });
    expect(typedInstant('2026-03-01T10:00', 'Asia/Kolkata')).toEqual({
      ok: true,
      iso: '2026-03-01T04:30:00.000Z',
    });
  });

  it('that the clocks skip is refused', () => {
    expect(typedInstant('2026-03-29T02:30', ZONE)).toMatchObject({ ok: false });
    expect(typedInstant('2026-03-29T03:00', ZONE)).toEqual({ ok: true, iso: '2026-03-29T01:00:00.000Z' });
  });

  it('that the clocks show twice means its first passing', () => {
    expect(typedInstant('2026-10-25T02:30', ZONE)).toEqual({ ok: true, iso: '2026-10-25T00:30:00.000Z' });
  });

  it('that no calendar has is refused', () => {
    for (const text of ['', 'soon', '2026-02-30T10:00', '2026-01-01T25:00', '2026-13-01T10:00'])
      expect(typedInstant(text, ZONE)).toMatchObject({ ok: false });
  });

  it('is typed back as it was', () => {
    for (const text of ['2026-03-01T10:00', '2026-07-01T00:00', '2026-12-31T23:59']) {
      const typed = typedInstant(text, ZONE);
      expect(typed.ok && wallTimeTyped(typed.iso, ZONE)).toBe(text);
    }
  });
});

const lineTyped = {
  key: 'arden-birk',
  name: 'Arden – Birk',
  voltageKv: '220',
  ratingAmps: ' 1000 ',
  emergencyRatingAmps: '1200.5',
  lengthKm: '42,5',
  kind: 'overhead',
  capacitanceNfPerKm: '',
  goesBy: 'phasors',
  inService: 'yes',
};

describe('a line as typed', () => {
  it('becomes an entry, with a comma or a point for decimals', () => {
    const { value, problems } = lineFromTyped(lineTyped);
    expect(problems).toEqual([]);
    expect(newLineSchema.parse({ ...value, key: lineTyped.key })).toMatchObject({
      ratingAmps: 1000,
      emergencyRatingAmps: 1200.5,
      lengthKm: 42.5,
      capacitanceNfPerKm: null,
      inService: true,
      seriesCompensated: false,
      inZoneTransformer: null,
    });
  });

  it('takes the owner without the blanks around it, and none for an empty field', () => {
    const ownerOf = (owner: string) => {
      const { value } = lineFromTyped({ ...lineTyped, owner });
      return newLineSchema.parse({ ...value, key: lineTyped.key }).owner;
    };
    expect(['  Pellwater Networks ', '', '   '].map(ownerOf)).toEqual(['Pellwater Networks', null, null]);
    const { value } = lineFromTyped({ ...lineTyped, owner: 'x'.repeat(81) });
    const long = newLineSchema.safeParse({ ...value, key: lineTyped.key });
    expect(long.error?.issues.map(({ path, message }) => [path.join('.'), message])).toEqual([
      ['owner', 'A name has at most 80 characters.'],
    ]);
  });

  it('does not guess whether 1,200 is a thousand or a little over one', () => {
    const { problems } = lineFromTyped({ ...lineTyped, ratingAmps: '1,200' });
    expect(problems).toEqual([
      {
        field: 'ratingAmps',
        problem: 'Give a number, with a point for decimals and nothing between thousands.',
      },
    ]);
  });

  it('says what is missing, and asks for a transformer’s figures only when there is one', () => {
    const fields = (typed: Record<string, string>) => lineFromTyped(typed).problems.map(({ field }) => field);
    expect(fields({ ...lineTyped, voltageKv: '', lengthKm: ' ' })).toEqual(['voltageKv', 'lengthKm']);
    expect(fields({ ...lineTyped, hasTransformer: 'yes' })).toEqual(['otherVoltageKv', 'clockNumber']);
  });
});

describe('a terminal as typed', () => {
  const known = new Map([['arden', 'Arden']]);

  it('takes the name of a known substation from the register', () => {
    const typed = { key: 't1', substation: 'arden', ctPrimaryAmps: '800', inService: 'yes' };
    const { value } = terminalFromTyped(typed, known);
    expect(newTerminalSchema.parse({ ...value, key: 't1' })).toMatchObject({
      substation: 'arden',
      substationName: 'Arden',
    });
  });

  it('names a new substation itself', () => {
    const typed = {
      substation: '',
      newSubstation: ' corl ',
      newSubstationName: 'Corl',
      ctPrimaryAmps: '800',
    };
    expect(terminalFromTyped(typed, known).value).toMatchObject({
      substation: 'corl',
      substationName: 'Corl',
      inService: false,
    });
  });
});

const PLACE = { timeZone: ZONE, terminals: ['arden', 'birk'], capacitanceNfPerKm: 8.9 };

describe('settings as typed', () => {
  const typed = {
    validFrom: '2026-03-01T10:00',
    pickupAmps: '120',
    slope1: '29',
    kneeAmps: '1500',
    slope2: '60',
    slopeStart: 'from-zero',
    restraint: 'scaled-sum',
    factor: '0.5',
    note: 'As commissioned.',
  };

  it('turn per cent into ratios and the site’s clock into an instant', () => {
    const { value, problems } = settingsFromTyped(typed, PLACE);
    expect(problems).toEqual([]);
    expect(newSettingsVersionSchema.parse(value)).toMatchObject({
      validFrom: '2026-03-01T09:00:00.000Z',
      characteristic: { slope1: 0.29, slope2: 0.6, pickupAmps: 120 },
      restraint: { kind: 'scaled-sum', factor: 0.5 },
    });
  });

  it('need no factor when the greatest magnitude restrains', () => {
    const { value, problems } = settingsFromTyped({ ...typed, restraint: 'maximum', factor: '' }, PLACE);
    expect(problems).toEqual([]);
    expect(newSettingsVersionSchema.parse(value).restraint).toEqual({ kind: 'maximum' });
  });

  it('say in the form’s own units what a slope may be', () => {
    const { problems } = settingsFromTyped({ ...typed, slope1: '300' }, PLACE);
    expect(problemsByField(problems).slope1).toBe('A slope is 0 to 200 %.');
  });

  it('that no scheme can have are named together with what is missing', () => {
    const { problems } = settingsFromTyped({ ...typed, validFrom: '', kneeAmps: '100', slope2: '10' }, PLACE);
    expect(problems.map(({ field }) => field)).toEqual(['validFrom', 'kneeAmps', 'slope2']);
  });
});

it('a problem stands at the form’s field, the typing’s own before the schema’s', () => {
  expect(
    problemsByField(
      [{ field: 'slope1', problem: 'typed' }],
      [
        { field: 'characteristic.slope1', problem: 'schema' },
        { field: 'inZoneTransformer.clockNumber', problem: 'other' },
      ],
    ),
  ).toEqual({ slope1: 'typed', clockNumber: 'other' });
});
