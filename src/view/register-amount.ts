import type { Problem } from '../contract/problem';
import type { Typed } from './register-form';

/** Figures as people type them. */

/** An amount as typed: absent when nothing was, the text itself when it is not a number, so that a schema refuses it. */
export function amount(text: string | undefined): number | string | undefined {
  const trimmed = (text ?? '').trim();
  if (trimmed === '') return undefined;
  const number = Number(trimmed.replace(',', '.'));
  // "1,200" may mean 1200 or 1.2: nobody may guess in a register
  if (/,\d{3}$/.test(trimmed) || !Number.isFinite(number)) return trimmed;
  return number;
}

/** A percentage as typed, as a ratio. */
export function ratio(text: string | undefined): number | string | undefined {
  const percent = amount(text);
  // Rounded at a millionth of a per cent: 30 % is 0.3 and not 0.30000000000000004
  return typeof percent === 'number' ? Math.round(percent * 1e6) / 1e8 : percent;
}

/** A ratio as a field in per cent holds it. */
// 0.29 · 100 is 28.999999999999996
export const percentTyped = (value: number): string => String(Math.round(value * 1e8) / 1e6);

export const NOT_A_NUMBER = 'Give a number, with a point for decimals and nothing between thousands.';

/** What is wrong with the typing itself of the fields named, each with what it asks for. */
export function amountProblems(typed: Typed, names: Readonly<Record<string, string>>): Problem['fields'] {
  return Object.entries(names).flatMap(([field, what]) => {
    const value = amount(typed[field]);
    if (value === undefined) return [{ field, problem: `Give ${what}.` }];
    return typeof value === 'number' ? [] : [{ field, problem: NOT_A_NUMBER }];
  });
}
