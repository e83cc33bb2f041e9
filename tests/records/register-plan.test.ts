import { describe, expect, it } from 'vitest';
import type { ImportKind } from '../../src/contract/register-import';
import type { RegisterLine } from '../../src/contract/register';
import type { SettingsVersion } from '../../src/contract/settings-version';
import { parseCsv } from '../../src/records/csv';
import { registerFile } from '../../src/records/register-files';
import { registerPlan } from '../../src/records/register-plan';
import { COLUMNS, sheetText, type Cells } from '../../src/records/sheet';
import { newLine, settingsSent, terminalSent } from '../register/made-up-line';

const errors = (terminal: string) => ({ terminal, errorBelow: 0.01, errorAbove: 1 / 3, limitAmps: 2400 });
const SCHEMES = [
  { restraint: { kind: 'maximum' } },
  {
    characteristic: {
      kind: 'adaptive',
      pickupAmps: 80.5,
      ctErrors: [errors('arden'), errors('birk')],
      timeErrorMs: 0.2,
    },
    restraint: { kind: 'error-sum' },
    chargingCompensation: true,
  },
  {
    characteristic: { kind: 'alpha-plane', pickupAmps: 100, radius: 6, angleDeg: 195 },
    restraint: { kind: 'none' },
    note: '=not a formula,\n"quoted"',
  },
  {
    characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 120 },
    restraint: { kind: 'none' },
  },
];

function line(change: Record<string, unknown> = {}): RegisterLine {
  const { terminals, settings, ...entry } = newLine({
    settings: SCHEMES.map((scheme, at) =>
      settingsSent({ validFrom: `2026-0${at + 1}-01T00:00:00.000Z`, ...scheme }),
    ),
    ...change,
  });
  return {
    ...entry,
    terminals: terminals.map((one, position) => ({ ...one, position })),
    settings: settings.map((version, id): SettingsVersion => ({
      ...{ id, recordedBy: 'Mira Holt', recordedAt: '2026-03-01T10:00:00.000Z' },
      ...version,
    })),
  };
}
const register = [
  line(),
  line({
    key: 'corl-dorn',
    leastInternalFaultAmps: 1850.25,
    inZoneTransformer: { otherVoltageKv: 110, clockNumber: 5, otherTerminals: ['birk'] },
    settings: [],
  }),
];

/** A file as it is exported, with cells of its first row changed or rows of its own. */
function file(kind: ImportKind, ...changes: Record<string, string>[]): string {
  const read = parseCsv(registerFile(kind, register));
  const records = read.ok ? read.records : [];
  const first: Cells = Object.fromEntries(COLUMNS[kind].map((name, at) => [name, records[1]![at]!]));
  return sheetText(
    kind,
    changes.map((change) => ({ ...first, ...change })),
  );
}
const problemsOf = (text: string) =>
  registerPlan(text, register).problems.map(({ row, field, problem }) => `${row} ${field}: ${problem}`);
const outcomesOf = (text: string) => registerPlan(text, register).rows.map(({ outcome }) => outcome);

describe('an exported file', () => {
  it.each(['lines', 'terminals', 'settings'] as const)('of %s changes nothing when it comes back', (kind) => {
    const plan = registerPlan(registerFile(kind, register), register);
    expect(plan).toMatchObject({ kind, problems: [], changes: [] });
    expect(new Set(plan.rows.map(({ outcome }) => outcome))).toEqual(new Set(['left']));
  });

  it('with semicolons, line feeds and decimal commas changes nothing either', () => {
    const text = registerFile('lines', register);
    const saved = text.replaceAll('\r\n', '\n').replaceAll(',', ';').replaceAll('42.5', '42,5');
    expect(registerPlan(saved, register)).toMatchObject({ kind: 'lines', problems: [], changes: [] });
  });

  it('of settings of every kind is the same for a line that has none yet', () => {
    const bare = [{ ...register[0]!, settings: [] }];
    const plan = registerPlan(registerFile('settings', register), bare);
    expect(plan.problems).toEqual([]);
    const versions = plan.changes.map((change) => (change.kind === 'settings' ? change.version : undefined));
    expect(versions).toEqual(
      register[0]!.settings.map(({ id: _id, recordedBy: _by, recordedAt: _at, ...version }) => version),
    );
  });
});

describe('a file is recognised by its header', () => {
  it('or refused with the headers that there are', () => {
    const plan = registerPlan('name,colour\nx,red\n', register);
    expect(plan.kind).toBeNull();
    expect(plan.problems[0]?.problem).toContain('lines: key, name, voltage_kv');
    expect(registerPlan('', register).kind).toBeNull();
  });

  it('which names a column that is missing, unknown or there twice', () => {
    const text = file('lines', {}).replace('voltage_kv', 'volts').replace('rating_a,', 'key,');
    expect(problemsOf(text)).toEqual([
      '1 voltage_kv: The column voltage_kv is missing.',
      '1 rating_a: The column rating_a is missing.',
      '1 volts: There is no column volts.',
      '1 key: The column key is there twice.',
    ]);
    expect(registerPlan(text, register).changes).toEqual([]);
  });

  it('and a row of another length, or a mark out of place, is named', () => {
    expect(problemsOf(`${file('terminals', {})}arden-birk,x\r\n`)).toEqual([
      '3 : This row has 2 cells, and the header has 8.',
    ]);
    expect(problemsOf(`${file('terminals', {})}"arden`)[0]).toMatch(/^3 : A quotation mark opens/);
    expect(problemsOf(sheetText('lines', []))).toEqual(['1 : The file has a header and no rows.']);
  });
});

describe('the owner of a line', () => {
  it('comes with its row, and an empty cell takes it away', () => {
    const owned = [{ ...register[0]!, owner: 'Pellwater' }];
    const given = registerPlan(file('lines', { owner: 'Tarnside, Ltd.' }), owned);
    expect(given.changes).toMatchObject([{ kind: 'line', patch: { owner: 'Tarnside, Ltd.' } }]);
    const taken = registerPlan(file('lines', { owner: '' }), owned);
    expect(taken.changes).toMatchObject([{ kind: 'line', patch: { owner: null } }]);
  });

  it('that is a formula to a spreadsheet comes back as it was, and one too long is named by its column', () => {
    const owned = [{ ...register[0]!, owner: '=Pell,"water"' }];
    expect(registerPlan(registerFile('lines', owned), owned)).toMatchObject({ problems: [], changes: [] });
    expect(problemsOf(file('lines', { owner: 'x'.repeat(81) }))).toEqual([
      '2 owner: A name has at most 80 characters.',
    ]);
  });

  it('stays as it is by a file from before there was such a column', () => {
    const owned = [{ ...register[0]!, owner: 'Pellwater' }];
    const at = COLUMNS.lines.indexOf('owner');
    const read = parseCsv(registerFile('lines', owned));
    const old = (read.ok ? read.records : []).map((record) => record.toSpliced(at, 1).join(';')).join('\n');
    expect(registerPlan(`${old}\n`, owned)).toMatchObject({ problems: [], changes: [] });
  });
});

describe('a row of lines', () => {
  it('adds, changes or leaves, and says which columns it changes', () => {
    const plan = registerPlan(file('lines', { key: 'new-line' }, { length_km: '43' }), register);
    expect(plan.problems).toEqual([]);
    expect(plan.rows).toEqual([
      { row: 2, subject: 'new-line', outcome: 'added', fields: [] },
      { row: 3, subject: 'arden-birk', outcome: 'changed', fields: ['length_km'] },
    ]);
    expect(plan.changes.map(({ kind }) => kind)).toEqual(['new line', 'line']);
  });

  it('leaves the terminals behind its transformer as they are', () => {
    const text = registerFile('lines', register).replace('110,5,', '110,11,');
    const [change] = registerPlan(text, register).changes;
    expect(change).toMatchObject({
      patch: { inZoneTransformer: { clockNumber: 11, otherTerminals: ['birk'] } },
    });
  });

  it('names every cell that is wrong', () => {
    const wrong = {
      ...{ key: 'Ärger', voltage_kv: '', rating_a: '1,200', length_km: '-4', kind: 'tunnel' },
      ...{ in_service: 'perhaps', capacitance_nf_per_km: '0', goes_by: '' },
      ...{ transformer_other_kv: '110', transformer_clock_number: '12' },
      transformer_zero_sequence_line: 'both',
    };
    expect(problemsOf(file('lines', wrong)).sort()).toEqual(
      [
        '2 key: A key is 1 to 40 lower-case letters, digits or hyphens.',
        '2 voltage_kv: This is missing: give a number.',
        '2 rating_a: Give a number, with a point for decimals and nothing between thousands.',
        '2 length_km: The length is above 0.',
        '2 kind: Give one of overhead, cable, mixed.',
        '2 in_service: Give yes or no.',
        '2 goes_by: Give one of phasors, reported.',
        '2 capacitance_nf_per_km: The capacitance is above 0.',
        '2 transformer_clock_number: The clock number is 0 to 11.',
        '2 transformer_zero_sequence_line: Give one of removed, kept.',
        '2 transformer_zero_sequence_other: Give one of removed, kept.',
      ].sort(),
    );
  });

  it('may not come twice, take a page’s own key, or rate an emergency below the rating', () => {
    expect(
      problemsOf(file('lines', {}, {}, { key: 'import' }, { key: 'x', emergency_rating_a: '900' })),
    ).toEqual([
      '3 key: Row 2 of this file has the same.',
      '4 key: The register needs the key "import" for itself. Give another.',
      '5 emergency_rating_a: The emergency rating is at least the rating.',
    ]);
  });
});

describe('a row of terminals', () => {
  it('adds after those that are there, and moves terminals behind the transformer', () => {
    const corl = { line: 'corl-dorn', key: 'corl', behind_transformer: 'yes' };
    const plan = registerPlan(file('terminals', corl), register);
    expect(plan.problems).toEqual([]);
    expect(plan.changes).toMatchObject([
      { kind: 'new terminal', key: 'corl-dorn', entry: { key: 'corl' } },
      { kind: 'line', patch: { inZoneTransformer: { otherTerminals: ['birk', 'corl'] } } },
    ]);
  });

  it('names a line that is not there, a contradicted name, and what no line can have', () => {
    expect(
      problemsOf(
        file(
          'terminals',
          { line: 'nowhere', ct_primary_a: 'x' },
          { key: 'c', substation_name: 'Ardenne' },
          { key: 'd', behind_transformer: 'yes' },
          { line: 'corl-dorn', key: 'arden', behind_transformer: 'yes' },
          { line: '', key: 'e', behind_transformer: '' },
        ),
      ),
    ).toEqual([
      '2 line: The register has no line nowhere; import the lines first.',
      '2 ct_primary_a: Give a number, with a point for decimals and nothing between thousands.',
      '3 substation_name: The key arden belongs to Arden.',
      '4 behind_transformer: This line has no transformer inside its zone.',
      '5 behind_transformer: At least one terminal is on the line itself, not behind the transformer.',
      '6 line: Give the key of a line.',
      '6 behind_transformer: Give yes or no.',
    ]);
  });

  it('makes a seventh of none', () => {
    const rows = ['c', 'd', 'e', 'f', 'g'].map((key) => ({ key, ...nameOf(key) }));
    expect(problemsOf(file('terminals', ...rows))).toEqual(['6 line: A line has at most 6 terminals.']);
  });
});

const nameOf = (key: string) => {
  const { substation, substationName } = terminalSent(key) as { substation: string; substationName: string };
  return { substation, substation_name: substationName };
};

describe('a row of settings', () => {
  const later = { valid_from: '2026-09-01T00:00:00+02:00' };

  it('adds a version, leaves one that is recorded, and rewrites none', () => {
    const text = file('settings', later, {}, { pickup_a: '130' });
    expect(outcomesOf(text)).toEqual(['added', 'left']);
    expect(problemsOf(text)[0]).toMatch(/^3 valid_from: Row|^4 valid_from: Row 3/);
    expect(problemsOf(text).at(-1)).toMatch(/^4 valid_from: This line already has other settings/);
  });

  it.each([
    [{ pickup_a: '-5' }, 'pickup_a: The pickup must be a number of amperes above 0.'],
    [
      { knee_a: '100' },
      'knee_a: The knee must be at or beyond 400 A, where the first slope leaves the pickup.',
    ],
    [{ slope2: '2.5' }, 'slope2: The second slope must be a ratio from 0 to 2 (0.3 is 30 %).'],
    [{ slope1: '' }, 'slope1: This is missing: give a number.'],
    [{ restraint: 'error-sum' }, 'restraint: Give one of scaled-sum, maximum.'],
    [{ radius: '4' }, 'radius: A characteristic of the kind two-slope has no radius; leave it empty.'],
    [{ note: '' }, 'note: Say why these settings are recorded.'],
    [{ valid_from: '1 May' }, 'valid_from: Give an instant with its offset, such as 2026-03-01T10:00:00Z.'],
    [{ kind: 'three-slope' }, 'kind: Give one of two-slope, adaptive, alpha-plane, phase-comparison.'],
    [{ line: 'nowhere' }, 'line: The register has no line nowhere; import the lines first.'],
    [
      { line: 'no-constants', charging_compensation: 'yes' },
      'charging_compensation: The charging current can be compensated only when the line’s capacitance is recorded, which it is not.',
    ],
  ])('of two slopes with %o is refused there', (change, problem) => {
    const known = [...register, line({ key: 'no-constants', capacitanceNfPerKm: null, settings: [] })];
    const { problems } = registerPlan(file('settings', { ...later, ...change }), known);
    expect(problems.map((found) => `${found.field}: ${found.problem}`)).toEqual([problem]);
  });

  const blank = Object.fromEntries(
    ['pickup_a', 'slope1', 'knee_a', 'slope2', 'slope_start', 'factor'].map((column) => [column, '']),
  );
  const alpha = { ...later, ...blank, kind: 'alpha-plane', restraint: 'none', pickup_a: '100' };
  const comparison = { ...later, ...blank, kind: 'phase-comparison', restraint: 'none' };
  const adaptive = { ...later, ...blank, kind: 'adaptive', restraint: 'error-sum', pickup_a: '100' };

  it.each([
    [{ ...alpha, radius: '1', angle_deg: '180' }, 'radius: The radius must be a ratio above 1'],
    [{ ...alpha, radius: '6', angle_deg: '361' }, 'angle_deg: The angle must be a number of degrees above 0'],
    [{ ...comparison, tolerance_deg: '0', release_a: '100' }, 'tolerance_deg: The tolerance angle must be'],
    [{ ...comparison, tolerance_deg: '60', release_a: '-1' }, 'release_a: The release current must be'],
    [
      { ...adaptive, time_error_ms: '0.2', ct_errors: 'arden 1' },
      'ct_errors: Give for each terminal its key',
    ],
    [
      { ...adaptive, time_error_ms: '0.2', ct_errors: 'arden 0.01 0.05 2400' },
      'ct_errors: State the transformer errors of birk.',
    ],
    [
      { ...adaptive, time_error_ms: '9', ct_errors: 'arden 0.01 0.05 2400; birk 0.01 0.05 2400' },
      'time_error_ms: The residual time error must be',
    ],
  ])('of another kind with %o is refused there', (row, problem) => {
    const problems = problemsOf(file('settings', row));
    expect(problems).toHaveLength(1);
    expect(problems[0]).toContain(problem);
  });

  it('of a phase comparison is refused for a line of three terminals, with the reason', () => {
    const three = line({
      key: 'three',
      terminals: ['a', 'b', 'c'].map(terminalSent),
      settings: [],
    });
    const row = { ...comparison, line: 'three', tolerance_deg: '60', release_a: '100' };
    expect(registerPlan(file('settings', row), [...register, three]).problems).toEqual([
      {
        row: 2,
        field: 'kind',
        problem: 'A phase comparison weighs two terminals against each other; this line has 3.',
      },
    ]);
  });
});
