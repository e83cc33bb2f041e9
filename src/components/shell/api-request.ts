import type { z } from 'zod';
import { problemSchema, type Problem } from '../../contract/problem';

/** An endpoint said no, or could not be reached: the message is a sentence for the person at the screen. */
export class RequestRefused extends Error {
  constructor(
    message: string,
    /** HTTP status; undefined when there was no answer */
    readonly status: number | undefined,
    readonly fields: Problem['fields'] = [],
  ) {
    super(message);
  }
}

export interface RequestOptions<Answer> {
  readonly answer: z.ZodType<Answer>;
  readonly method?: 'GET' | 'POST' | 'PATCH' | 'DELETE';
  readonly body?: unknown;
  readonly signal?: AbortSignal;
}

/** Asks an endpoint of this site; the answer is checked by the contract before anybody draws it. */
export async function apiRequest<Answer>(path: string, options: RequestOptions<Answer>): Promise<Answer> {
  const response = await send(path, options);
  const body: unknown = await response.json().catch(() => undefined);
  if (!response.ok) throw refusalOf(response.status, body);
  const parsed = options.answer.safeParse(body);
  if (!parsed.success) throw new RequestRefused('The answer was not in the agreed form.', response.status);
  return parsed.data;
}

async function send<Answer>(path: string, options: RequestOptions<Answer>): Promise<Response> {
  const { method = 'GET', body, signal } = options;
  try {
    return await fetch(path, {
      method,
      headers: {
        Accept: 'application/json',
        ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      ...(signal === undefined ? {} : { signal }),
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new RequestRefused('Tareline could not be reached.', undefined);
  }
}

function refusalOf(status: number, body: unknown): RequestRefused {
  if (status === 401) return new RequestRefused('Your session has ended. Sign in again.', status);
  const parsed = problemSchema.safeParse(body);
  if (!parsed.success) return new RequestRefused(`Tareline answered with status ${status}.`, status);
  return new RequestRefused(parsed.data.problem, status, parsed.data.fields);
}
