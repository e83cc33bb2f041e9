import type { Problem } from '../contract/problem';

/** What stood in a form's fields, by name; a box that was not ticked is absent. */
export type Typed = Readonly<Record<string, string>>;

/** What a schema is to judge, and what could already be told from the typing itself. */
export interface FromTyped {
  readonly value: Record<string, unknown>;
  readonly problems: Problem['fields'];
}
