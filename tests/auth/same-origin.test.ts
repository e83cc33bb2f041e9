import { describe, expect, it } from 'vitest';
import { isForeign } from '../../src/auth/same-origin';

const HERE = 'https://tareline.example/';
const sent = (method: string, headers: Record<string, string>) =>
  isForeign({ method, headers: new Headers(headers) }, HERE);

describe('the same-origin check', () => {
  it('takes a page of this site at its word', () => {
    expect(sent('POST', { origin: 'https://tareline.example', 'sec-fetch-site': 'same-origin' })).toBe(false);
  });
  it.each([
    ['another site', { origin: 'https://elsewhere.example' }],
    ['the same name without TLS', { origin: 'http://tareline.example' }],
    ['another port', { origin: 'https://tareline.example:8443' }],
    ['a page without an origin', { origin: 'null' }],
    ['a browser that hides the origin but says cross-site', { 'sec-fetch-site': 'cross-site' }],
    ['a neighbour under the same domain', { 'sec-fetch-site': 'same-site' }],
  ])('finds %s foreign', (_who, headers) => {
    for (const method of ['POST', 'PATCH', 'PUT', 'DELETE']) expect(sent(method, headers)).toBe(true);
  });
  it('lets a script through, which sends neither header', () => {
    expect(sent('POST', { cookie: 'tareline=x' })).toBe(false);
  });
  it('leaves reading alone, for links from elsewhere must work', () => {
    expect(sent('GET', { origin: 'https://elsewhere.example', 'sec-fetch-site': 'cross-site' })).toBe(false);
  });
});
