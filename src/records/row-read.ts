import type { Problem } from '../contract/problem';

/** What a row means, or every cell that keeps it from meaning something. */
export type RowRead<Value> =
  { readonly ok: true; readonly value: Value } | { readonly ok: false; readonly problems: Problem['fields'] };
