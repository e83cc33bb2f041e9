import type { z } from 'zod';
import type { Problem } from '../contract/problem';

type Issue = z.core.$ZodIssue;

/** A row's value by its schema, or every problem by its path; a path that a row cannot have reads as its beginning. */
export function judged<Schema extends z.ZodType>(
  schema: Schema,
  value: unknown,
): { ok: true; value: z.output<Schema> } | { ok: false; problems: Problem['fields'] } {
  const parsed = schema.safeParse(value);
  if (parsed.success) return { ok: true, value: parsed.data };
  const problems = parsed.error.issues.map((issue) => ({
    field: issue.path.map(String).join('.'),
    problem: sentence(issue),
  }));
  return { ok: false, problems };
}

/** The schema's own sentence where it has one; the library's stock message is turned into one. */
function sentence(issue: Issue): string {
  if (!/^(Invalid|Too (big|small)|Unrecognized)\b/.test(issue.message)) return issue.message;
  switch (issue.code) {
    case 'too_big':
      return issue.origin === 'string'
        ? `Give at most ${issue.maximum} characters.`
        : `Give at most ${issue.maximum}.`;
    case 'too_small':
      return `Give ${issue.inclusive === false ? 'more than' : 'at least'} ${issue.minimum}.`;
    case 'invalid_type':
      return issue.expected === 'int' ? 'Give a whole number.' : 'Give a number.';
    default:
      return 'This is not understood.';
  }
}
