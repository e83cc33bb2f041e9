import { z } from 'zod';
import type { Problem } from '../contract/problem';
import { amount, NOT_A_NUMBER } from '../view/register-amount';
import { unguardedText } from './guarded-text';
import type { Cells } from './sheet';

const INSTANT = z.iso.datetime({ offset: true });
const NO_INSTANT = 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.';

type FieldProblem = Problem['fields'][number];

/** Reads the cells of one row, and gathers what is wrong with how they are written. */
export interface CellReader {
  readonly problems: FieldProblem[];
  text(column: string): string;
  /** undefined for an empty cell, and for one that is not a number, which is then a problem */
  amount(column: string): number | undefined;
  /** as `amount`, of a cell that may not be empty */
  figure(column: string): number | undefined;
  /** an instant with its offset, as UTC */
  instant(column: string): string | undefined;
  yesOrNo(column: string): boolean;
  oneOf<Word extends string>(column: string, words: readonly Word[]): Word | undefined;
}

export function cellReader(cells: Cells): CellReader {
  const problems: FieldProblem[] = [];
  const refuse = (field: string, problem: string): undefined => void problems.push({ field, problem });
  const raw = (column: string) => cells[column] ?? '';
  const read = (column: string) => {
    const value = amount(raw(column));
    return typeof value === 'string' ? refuse(column, NOT_A_NUMBER) : value;
  };
  return {
    problems,
    text: (column) => unguardedText(raw(column)),
    amount: read,
    figure: (column) =>
      raw(column) === '' ? refuse(column, 'This is missing: give a number.') : read(column),
    instant: (column) => {
      const instant = INSTANT.safeParse(raw(column));
      return instant.success ? new Date(instant.data).toISOString() : refuse(column, NO_INSTANT);
    },
    yesOrNo: (column) => {
      const word = raw(column).toLowerCase();
      if (word !== 'yes' && word !== 'no') refuse(column, 'Give yes or no.');
      return word === 'yes';
    },
    oneOf: (column, words) => {
      const word = words.find((each) => each === raw(column));
      return word ?? refuse(column, `Give ${words.length > 1 ? 'one of ' : ''}${words.join(', ')}.`);
    },
  };
}

export const yesOrNo = (value: boolean): string => (value ? 'yes' : 'no');
export const amountCell = (value: number | null | undefined): string =>
  value === null || value === undefined ? '' : String(value);

/** Problems by column: the first of each, those of the writing before those of the meaning. */
export function columnProblems(
  ...lists: readonly (readonly { readonly field: string; readonly problem: string }[])[]
): FieldProblem[] {
  const seen = new Map<string, FieldProblem>();
  for (const found of lists.flat()) if (!seen.has(found.field)) seen.set(found.field, found);
  return [...seen.values()];
}

/** Problems by a schema's paths, as problems by column; a path with no column of its own goes to the one that begins it. */
export function atColumns(
  problems: readonly { readonly field: string; readonly problem: string }[],
  columnOf: Readonly<Record<string, string>>,
): FieldProblem[] {
  return problems.map(({ field, problem }) => {
    const parts = field.split('.');
    const known = parts
      .map((_, at) => parts.slice(0, parts.length - at).join('.'))
      .find((path) => columnOf[path] !== undefined);
    return { field: known === undefined ? field : columnOf[known]!, problem };
  });
}
