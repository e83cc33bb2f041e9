const NOWHERE = 'http://this-site.invalid';
const NOT_BACK_TO = ['/sign-in', '/welcome', '/api', '/_'];
const LONGEST = 1000;

/** Where to go after signing in: the path asked for when it lies on this site and is a page, else the Board. */
export function returnPath(asked: string | null | undefined): string {
  // a browser reads '//host' and '/\host' as another site, and drops tabs and line breaks before it looks
  if (!asked || asked.length > LONGEST || !/^\/(?![/\\])[^\\\p{Cc}]*$/u.test(asked)) return '/';
  if (!URL.canParse(asked, NOWHERE)) return '/';
  const url = new URL(asked, NOWHERE);
  if (url.origin !== NOWHERE || url.pathname.startsWith('//')) return '/';
  return NOT_BACK_TO.some((start) => url.pathname.startsWith(start)) ? '/' : `${url.pathname}${url.search}`;
}
