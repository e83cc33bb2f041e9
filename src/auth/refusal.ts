import type { Problem } from '../contract/problem';

/** The JSON answer of an endpoint that refuses. */
export function refusal(
  status: number,
  problem: string,
  more: { fields?: Problem['fields']; headers?: Record<string, string> } = {},
): Response {
  const body: Problem = { problem, fields: more.fields ?? [] };
  return Response.json(body, { status, headers: { 'Cache-Control': 'no-store', ...more.headers } });
}
