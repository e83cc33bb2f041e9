import type { Problem } from '../contract/problem';
import type { InZoneTransformer, NewLine, NewSettingsVersion } from '../contract/register';
import { schemeProblems } from '../protection/scheme';

export const TERMINALS_MOST = 6;
export const SEVENTH_TERMINAL = `A line has at most ${TERMINALS_MOST} terminals.`;

type FieldProblem = Problem['fields'][number];

/** What of a line its settings are judged by. */
export interface SettingsPlace {
  /** keys of its terminals */
  readonly terminals: readonly string[];
  readonly capacitanceNfPerKm: number | null;
}

/** What no protection scheme could mean on this line, beside the field. */
export function settingsProblems(version: NewSettingsVersion, place: SettingsPlace): FieldProblem[] {
  return [...schemeProblems(version, place), ...compensationProblems(version, place)];
}

/** Charging can only be compensated with the constant that it follows from. */
export function compensationProblems(
  { chargingCompensation }: Pick<NewSettingsVersion, 'chargingCompensation'>,
  { capacitanceNfPerKm }: Pick<SettingsPlace, 'capacitanceNfPerKm'>,
): FieldProblem[] {
  if (!chargingCompensation || capacitanceNfPerKm !== null) return [];
  const problem =
    'The charging current can be compensated only when the line’s capacitance is recorded, which it is not.';
  return [{ field: 'chargingCompensation', problem }];
}

/** What is wrong with the terminals behind a transformer in the zone, on a line that has these terminals. */
export function transformerProblems(
  transformer: InZoneTransformer | null,
  terminals: readonly string[],
): FieldProblem[] {
  const { otherTerminals = [] } = transformer ?? {};
  const field = 'inZoneTransformer.otherTerminals';
  const unknown = otherTerminals.filter((key) => !terminals.includes(key));
  const twice = otherTerminals.filter((key, at) => otherTerminals.indexOf(key) < at);
  const isAll = terminals.length > 0 && terminals.every((key) => otherTerminals.includes(key));
  return [
    ...unknown.map((key) => ({ field, problem: `This line has no terminal ${key}.` })),
    ...twice.map((key) => ({ field, problem: `The terminal ${key} is named twice.` })),
    ...(isAll
      ? [{ field, problem: 'At least one terminal is on the line itself, not behind the transformer.' }]
      : []),
  ];
}

/** Addresses of the register's own pages, which a line of that key could never be opened under. */
const RESERVED_KEYS: readonly string[] = ['new', 'import'];

/** What is wrong within a new line's own entry: impossible settings, and keys or instants given twice. */
export function newLineProblems(entry: NewLine): FieldProblem[] {
  const { capacitanceNfPerKm } = entry;
  const terminals = entry.terminals.map(({ key }) => key);
  return [
    ...(RESERVED_KEYS.includes(entry.key)
      ? [{ field: 'key', problem: `The register needs the key "${entry.key}" for itself. Give another.` }]
      : []),
    ...transformerProblems(entry.inZoneTransformer, terminals),
    ...repeated(terminals, (at) => `terminals.${at}.key`, 'Another terminal of this line has the same key.'),
    ...repeated(
      entry.settings.map(({ validFrom }) => Date.parse(validFrom)),
      (at) => `settings.${at}.validFrom`,
      'Another version of this line is valid from the same instant.',
    ),
    ...entry.settings.flatMap((version, at) =>
      settingsProblems(version, { terminals, capacitanceNfPerKm }).map(({ field, problem }) => ({
        field: `settings.${at}.${field}`,
        problem,
      })),
    ),
  ];
}

function repeated<T>(values: readonly T[], field: (at: number) => string, problem: string): FieldProblem[] {
  return values.flatMap((value, at) => (values.indexOf(value) < at ? [{ field: field(at), problem }] : []));
}

/** The fields of a patch that differ from what stands, before and after: what the audit trail keeps. */
export function changedFields<Row extends object>(
  before: Row,
  patch: object,
): { before: Partial<Row>; after: Partial<Row> } | undefined {
  const differing = (Object.keys(patch) as (keyof Row)[]).filter((field) => {
    const after = (patch as Row)[field];
    return after !== undefined && JSON.stringify(before[field]) !== JSON.stringify(after);
  });
  if (differing.length === 0) return undefined;
  const only = (row: Row) =>
    Object.fromEntries(differing.map((field) => [field, row[field]])) as Partial<Row>;
  return { before: only(before), after: only(patch as Row) };
}
