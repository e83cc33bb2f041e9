export interface PagePolicy {
  readonly publicUrl: string;
  /** hashes that Astro gave for the inline scripts and styles of this very page, as they stand in a policy */
  readonly scriptHashes: readonly string[];
  readonly styleHashes: readonly string[];
  /** the development server writes inline scripts and styles of its own */
  readonly development: boolean;
}

/**
 * The headers that every page and endpoint carries. No script runs but ours: files of this site and the inline
 * starters of islands by their hashes. Style attributes are allowed, since strips and charts place their marks
 * by them; style elements only by hash.
 */
export function securityHeaders(policy: PagePolicy): Readonly<Record<string, string>> {
  const { protocol, host } = new URL(policy.publicUrl);
  const secure = protocol === 'https:';
  const inline = (hashes: readonly string[]) => (policy.development ? ["'unsafe-inline'"] : hashes);
  const directives: Readonly<Record<string, readonly string[]>> = {
    'default-src': ["'self'"],
    'script-src': ["'self'", ...inline(policy.scriptHashes)],
    'style-src': ["'self'", ...inline(policy.styleHashes)],
    'style-src-attr': ["'unsafe-inline'"],
    'img-src': ["'self'", 'data:', 'blob:'],
    'connect-src': ["'self'", `${secure ? 'wss' : 'ws'}://${host}`],
    'object-src': ["'none'"],
    'frame-ancestors': ["'none'"],
    'base-uri': ["'none'"],
    'form-action': ["'self'"],
  };
  return {
    'Content-Security-Policy': Object.entries(directives)
      .map(([name, sources]) => [name, ...sources].join(' '))
      .join('; '),
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'same-origin',
    'Permissions-Policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()',
    'Cross-Origin-Opener-Policy': 'same-origin',
    'Cross-Origin-Resource-Policy': 'same-origin',
    ...(secure ? { 'Strict-Transport-Security': 'max-age=31536000' } : {}),
  };
}
