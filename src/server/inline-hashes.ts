import { createHash } from 'node:crypto';

/**
 * Of the hashes that Astro's policy allows, those that this page has inline. Astro lists every file of the whole
 * build besides, which 'self' covers and which would outgrow what proxies take as a header. Nothing that Astro did
 * not list is ever added, so that a script smuggled into a page stays dead.
 */
export function inlineHashes(html: string, astroPolicy: string): { scripts: string[]; styles: string[] } {
  const listed = new Set(astroPolicy.match(/'sha256-[A-Za-z0-9+/=]+'/g));
  const found = (element: 'script' | 'style') => {
    const bodies = html.matchAll(new RegExp(`<${element}\\b[^>]*>([\\s\\S]*?)</${element}>`, 'gi'));
    const inline = [...bodies].filter((match) => match[1] !== '');
    const hashes = inline.map(
      (match) => `'sha256-${createHash('sha256').update(match[1]!).digest('base64')}'`,
    );
    return [...new Set(hashes)].filter((hash) => listed.has(hash));
  };
  return { scripts: found('script'), styles: found('style') };
}
