import type { Problem } from '../contract/problem';

/** What stands in the fields of a form for recorded work. */
export interface WorkTyped {
  readonly what: string;
  readonly doneOn: string;
  readonly terminal: string;
}

/** What is wrong, beside the field that it is about, or with the whole. */
export type WorkProblems = Readonly<Partial<Record<'what' | 'doneOn' | 'terminal' | 'whole', string>>>;

const FIELDS = ['what', 'doneOn', 'terminal'] as const;

/** Problems beside their fields; one of a field that the form does not have is the whole's. */
export function workProblems(problems: Problem['fields']): WorkProblems {
  const found: Partial<Record<keyof WorkProblems, string>> = {};
  for (const { field, problem } of problems) {
    const own = FIELDS.find((name) => field === name || field === `work.${name}`) ?? 'whole';
    found[own] ??= problem;
  }
  return found;
}
