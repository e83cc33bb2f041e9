import type { Problem } from '../contract/problem';
import type { ImportReport } from '../contract/register-import';

/** What keeps a file from being written, in the form of every refusal: `3.rating_a` is a cell of row 3. */
export function importProblem({ problems }: ImportReport): Problem | undefined {
  const [first] = problems;
  if (first === undefined) return undefined;
  const count = problems.length === 1 ? 'one problem' : `${problems.length} problems`;
  return {
    problem: `The file has ${count}, so nothing of it is written.`,
    fields: problems.map(({ row, field, problem }) => ({
      field: field === '' ? String(row) : `${row}.${field}`,
      problem,
    })),
  };
}
