import type { Problem } from '../contract/problem';
import type { NewLine, NewSettingsVersion } from '../contract/register';
import { characteristicProblems } from '../protection/characteristic';
import { restraintProblems } from '../protection/restraint';

export const TERMINALS_MOST = 6;
export const SEVENTH_TERMINAL = `A line has at most ${TERMINALS_MOST} terminals.`;

type FieldProblem = Problem['fields'][number];

/** What no protection scheme could mean, beside the field; `prefix` is the path of the version in what was sent. */
export function settingsProblems(version: NewSettingsVersion, prefix = ''): FieldProblem[] {
  const under = (part: string) => (found: FieldProblem) => ({
    field: `${prefix}${part}.${found.field}`,
    problem: found.problem,
  });
  return [
    ...characteristicProblems(version.characteristic).map(under('characteristic')),
    ...restraintProblems(version.restraint).map(under('restraint')),
  ];
}

/** What is wrong within a new line's own entry: impossible settings, and keys or instants given twice. */
export function newLineProblems(entry: NewLine): FieldProblem[] {
  return [
    ...repeated(
      entry.terminals.map(({ key }) => key),
      (at) => `terminals.${at}.key`,
      'Another terminal of this line has the same key.',
    ),
    ...repeated(
      entry.settings.map(({ validFrom }) => Date.parse(validFrom)),
      (at) => `settings.${at}.validFrom`,
      'Another version of this line is valid from the same instant.',
    ),
    ...entry.settings.flatMap((version, at) => settingsProblems(version, `settings.${at}.`)),
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
