import { describe, expect, it } from 'vitest';
import { returnPath } from '../../src/auth/return-path';

describe('the way back after signing in', () => {
  it.each(['/lines/ashford-beck', '/register?sort=name', '/', '/lines/a?from=2026-03-01T00:00:00Z'])(
    'leads to the page asked for: %s',
    (asked) => expect(returnPath(asked)).toBe(asked),
  );
  it.each([
    undefined,
    null,
    '',
    'https://elsewhere.example/',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '/\t/elsewhere.example',
    '/\n/elsewhere.example',
    '/.//elsewhere.example',
    '/a/..//elsewhere.example',
    '\\\\elsewhere.example',
    'javascript:alert(1)',
    'elsewhere.example',
    '/lines\\..\\x',
    '/sign-in?next=/sign-in',
    '/api/sign-out',
    `/${'a'.repeat(2000)}`,
  ])('leads to the Board instead of %j', (asked) => expect(returnPath(asked)).toBe('/'));
});
