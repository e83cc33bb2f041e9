import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { inlineHashes } from '../../src/server/inline-hashes';
import { securityHeaders } from '../../src/server/security-headers';

const headers = (publicUrl: string, scriptHashes: readonly string[] = []) =>
  securityHeaders({ publicUrl, scriptHashes, styleHashes: [], development: false });
const directive = (policy: string | undefined, name: string) =>
  policy
    ?.split('; ')
    .find((part) => part.startsWith(`${name} `))
    ?.slice(name.length + 1);

describe('the content security policy', () => {
  const policy = headers('https://tareline.example', ["'sha256-abc='"])['Content-Security-Policy'];

  it('runs no script but files of this site and those named by hash', () => {
    expect(directive(policy, 'script-src')).toBe("'self' 'sha256-abc='");
    expect(directive(policy, 'style-src')).toBe("'self'");
    expect(policy).not.toContain('unsafe-eval');
    expect(policy?.split('unsafe-inline')).toHaveLength(2);
    expect(directive(policy, 'style-src-attr')).toBe("'unsafe-inline'");
  });
  it.each([
    ['frame-ancestors', "'none'"],
    ['base-uri', "'none'"],
    ['object-src', "'none'"],
    ['form-action', "'self'"],
    ['connect-src', "'self' wss://tareline.example"],
  ])('holds %s to %s', (name, sources) => expect(directive(policy, name)).toBe(sources));
});

describe('the other headers', () => {
  it('ask for TLS only where the site is reached by it', () => {
    expect(headers('https://tareline.example')['Strict-Transport-Security']).toBe('max-age=31536000');
    expect(headers('http://localhost:8720')).not.toHaveProperty('Strict-Transport-Security');
  });
  it('are on every answer', () => {
    expect(headers('http://localhost:8720')).toMatchObject({
      'X-Content-Type-Options': 'nosniff',
      'Referrer-Policy': 'same-origin',
      'Permissions-Policy': expect.stringContaining('camera=()'),
    });
  });
});

describe('the hashes of a page’s inline scripts', () => {
  const hash = (text: string) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
  const island = 'customElements.define("astro-island", class {})';
  const astroPolicy = `script-src 'self' ${hash(island)} ${hash('a whole bundle')}; style-src 'self' ${hash('a{}')};`;

  it('are those that Astro listed and the page holds', () => {
    const html = `<style>a{}</style><script>${island}</script><script type="module" src="/x.js"></script>`;
    expect(inlineHashes(html, astroPolicy)).toEqual({ scripts: [hash(island)], styles: [hash('a{}')] });
  });
  it('leave out a script that was smuggled in', () => {
    const html = `<script>${island}</script><script>steal()</script>`;
    expect(inlineHashes(html, astroPolicy).scripts).toEqual([hash(island)]);
  });
});
