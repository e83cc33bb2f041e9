const SAFE_METHODS: readonly string[] = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Whether a request that could change something was sent by another site's page.
 *
 * A browser names the page's origin on every unsafe request, and newer ones also say Sec-Fetch-Site; both must
 * be ours. A request that carries neither comes from a script, which no foreign page can make send our cookie,
 * and is let through to the session and role checks.
 */
export function isForeign(request: { method: string; headers: Headers }, publicUrl: string): boolean {
  if (SAFE_METHODS.includes(request.method)) return false;
  const origin = request.headers.get('origin');
  if (origin !== null && origin !== new URL(publicUrl).origin) return true;
  const fetchSite = request.headers.get('sec-fetch-site');
  return fetchSite !== null && fetchSite !== 'same-origin';
}
