import type { z } from 'zod';
import type { Problem } from '../contract/problem';

/** How an endpoint refuses: always JSON, a sentence, and each field with its own. */

type Issue = z.core.$ZodIssue;
type FieldProblem = Problem['fields'][number];

export const BODY_BYTES_MOST = 256 * 1024;
const NAMED_MOST = 6;

const HEADERS = { 'content-type': 'application/json; charset=utf-8', 'cache-control': 'no-store' };

export function jsonAnswer(value: unknown, status = 200): Response {
  return new Response(JSON.stringify(value), { status, headers: HEADERS });
}

export function jsonProblem(status: number, problem: Problem | string): Response {
  return jsonAnswer(typeof problem === 'string' ? { problem, fields: [] } : problem, status);
}

/** What a schema found wrong, in sentences for whoever sent it: the first in the summary, every field with its own. */
export function problemOf(error: z.ZodError): Problem {
  const fields = error.issues.flatMap(fieldProblems);
  const named = [...new Set(fields.map(({ field }) => field).filter((field) => field !== ''))];
  if (named.length === 0)
    return { problem: fields[0]?.problem ?? 'What was sent is not understood.', fields: [] };
  const shown = named.slice(0, NAMED_MOST).join(', ');
  const more = named.length > NAMED_MOST ? ` and ${named.length - NAMED_MOST} more` : '';
  return { problem: `What was sent cannot be taken as it stands: see ${shown}${more}.`, fields };
}

export type Parsed<Value> = { ok: true; value: Value } | { ok: false; problem: Problem };

/** A value by its schema, or every problem at once. */
export function parseSent<Schema extends z.ZodType>(schema: Schema, sent: unknown): Parsed<z.output<Schema>> {
  const parsed = schema.safeParse(sent);
  return parsed.success ? { ok: true, value: parsed.data } : { ok: false, problem: problemOf(parsed.error) };
}

/** What stands for a body that was left out, where it may be. */
interface EmptyBody {
  readonly whenEmpty?: unknown;
}

/** The JSON body of a request, or the answer that refuses it. */
export async function readJson(
  request: Request,
  { whenEmpty }: EmptyBody = {},
): Promise<{ ok: true; value: unknown } | { ok: false; answer: Response }> {
  const refused = (status: number, sentence: string) => ({
    ok: false as const,
    answer: jsonProblem(status, sentence),
  });
  const isJson = /^application\/json\b/i.test(request.headers.get('content-type') ?? '');
  // A page of another origin can post text or forms unasked, but not this type
  if (!isJson && whenEmpty === undefined) return refused(415, WANTS_JSON);
  const bytes = await bodyBytes(request);
  if (bytes === undefined)
    return refused(413, `The body is larger than the ${BODY_BYTES_MOST / 1024} KB allowed.`);
  if (bytes.length === 0 && whenEmpty !== undefined) return { ok: true, value: whenEmpty };
  if (!isJson) return refused(415, WANTS_JSON);
  try {
    return { ok: true, value: JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)) };
  } catch {
    return refused(400, 'The body is not JSON.');
  }
}

const WANTS_JSON = 'Send JSON, with the content type application/json.';

/** A request's JSON body by a schema, or the answer that refuses it. */
export async function readSent<Schema extends z.ZodType>(
  request: Request,
  schema: Schema,
  empty: EmptyBody = {},
): Promise<{ ok: true; value: z.output<Schema> } | { ok: false; answer: Response }> {
  const body = await readJson(request, empty);
  if (!body.ok) return body;
  const parsed = parseSent(schema, body.value);
  return parsed.ok ? parsed : { ok: false, answer: jsonProblem(400, parsed.problem) };
}

async function bodyBytes(request: Request): Promise<Buffer | undefined> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of (request.body ?? []) as AsyncIterable<Uint8Array>) {
    size += chunk.length;
    if (size > BODY_BYTES_MOST) return undefined;
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

function fieldProblems(issue: Issue): FieldProblem[] {
  const path = issue.path.map(String);
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({
      field: [...path, key].join('.'),
      problem: `There is no field of the name "${key}" here.`,
    }));
  return [{ field: path.join('.'), problem: sentence(issue) }];
}

/** The schema's own sentence where it has one; the library's stock message is turned into one. */
function sentence(issue: Issue): string {
  if (!/^(Invalid|Too (big|small)|Unrecognized)\b/.test(issue.message)) return issue.message;
  switch (issue.code) {
    case 'invalid_type':
      return issue.message.endsWith('received undefined')
        ? 'This is missing.'
        : `Give ${typeInWords(issue.expected)}.`;
    case 'invalid_value':
      return issue.values.length === 1
        ? `Give ${String(issue.values[0])}.`
        : `Give one of ${alternatives(issue.values)}.`;
    case 'invalid_union':
      return unionSentence(issue);
    case 'invalid_format':
      return issue.format === 'datetime'
        ? 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.'
        : 'This is not in the form that is asked for.';
    case 'too_small':
      return sizeSentence({ ...issue, limit: issue.minimum, least: true });
    case 'too_big':
      return sizeSentence({ ...issue, limit: issue.maximum, least: false });
    default:
      return 'This is not understood.';
  }
}

const TYPES: Readonly<Record<string, string>> = {
  number: 'a finite number',
  int: 'a whole number',
  string: 'text',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
};

const typeInWords = (expected: string): string => TYPES[expected] ?? expected;

const alternatives = (values: readonly unknown[]): string => values.map(String).join(', ');

function unionSentence(issue: Issue & { code: 'invalid_union' }): string {
  const options = 'options' in issue && Array.isArray(issue.options) ? issue.options : [];
  if (options.length === 0) return 'This is none of the forms allowed here.';
  return options.length === 1 ? `Give ${String(options[0])}.` : `Give one of ${alternatives(options)}.`;
}

function sizeSentence({
  origin,
  limit,
  inclusive,
  least,
}: {
  origin: string;
  limit: number | bigint;
  inclusive?: boolean;
  least: boolean;
}): string {
  const bound = inclusive === false ? (least ? 'more than' : 'less than') : least ? 'at least' : 'at most';
  if (origin === 'string') return `Give ${bound} ${limit} characters.`;
  if (origin === 'array') return `Give ${bound} ${limit} of these.`;
  return `Give a number of ${bound} ${limit}.`;
}
