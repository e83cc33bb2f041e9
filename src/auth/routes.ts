import type { Ability } from './abilities';

/** What a route asks of whoever calls it. */
export type Need = Ability | 'nothing';

interface RouteRule {
  /** the start of Astro's route pattern, whole segments */
  readonly under: string;
  readonly methods: readonly string[];
  readonly need: Need;
}

const READ = ['GET', 'HEAD'];
const FORM = ['GET', 'HEAD', 'POST'];

/** The one table of routes. What is not here is closed to everyone; the longest start that matches decides. */
const RULES: readonly RouteRule[] = [
  { under: '/sign-in', methods: FORM, need: 'nothing' },
  { under: '/welcome', methods: FORM, need: 'nothing' },
  { under: '/404', methods: FORM, need: 'nothing' },
  { under: '/500', methods: FORM, need: 'nothing' },
  { under: '/api/sign-in', methods: ['POST'], need: 'nothing' },
  { under: '/api/sign-out', methods: ['POST'], need: 'nothing' },

  { under: '/', methods: READ, need: 'see lines' },
  { under: '/lines', methods: READ, need: 'see lines' },
  { under: '/register', methods: READ, need: 'see the register' },
  { under: '/register', methods: ['POST'], need: 'edit the register' },
  { under: '/register/new', methods: FORM, need: 'edit the register' },
  { under: '/feeds', methods: READ, need: 'see feeds' },
  { under: '/proposals', methods: READ, need: 'see lines' },
  { under: '/margins', methods: READ, need: 'see margins' },
  { under: '/forecast', methods: READ, need: 'see forecast' },

  { under: '/api/lines', methods: READ, need: 'see lines' },
  { under: '/api/warnings', methods: READ, need: 'see lines' },
  { under: '/api/warnings/[id]/acknowledge', methods: ['POST'], need: 'acknowledge warnings' },
  { under: '/api/lines/[key]/replay', methods: ['POST'], need: 'replay settings' },
  { under: '/api/lines/[key]/proposals', methods: ['POST'], need: 'keep proposals' },
  { under: '/api/replays', methods: READ, need: 'see lines' },
  { under: '/api/replays', methods: ['DELETE'], need: 'replay settings' },
  { under: '/api/proposals', methods: READ, need: 'see lines' },
  { under: '/api/margins', methods: READ, need: 'see margins' },
  { under: '/api/follow-ups', methods: READ, need: 'see forecast' },
  { under: '/api/follow-ups', methods: ['POST'], need: 'keep follow-ups' },
  { under: '/api/works', methods: READ, need: 'see lines' },
  { under: '/api/works', methods: ['POST'], need: 'record work' },
  { under: '/api/feed', methods: READ, need: 'see feeds' },
  { under: '/api/register', methods: READ, need: 'see the register' },
  { under: '/api/register', methods: ['POST', 'PATCH', 'DELETE'], need: 'edit the register' },
  { under: '/api/register/lines/[key]/settings', methods: ['POST'], need: 'record settings' },
];

/** The forms that a page of the signed-out may run; Astro would let any page run any of them. */
export const SIGNED_OUT_ACTIONS: readonly string[] = ['signIn', 'signOut', 'choosePassword'];

export type RouteNeed =
  | { readonly kind: 'open'; readonly need: Need }
  | { readonly kind: 'no such route' }
  | { readonly kind: 'no such method'; readonly allowed: readonly string[] };

/**
 * What a route asks for. It goes by the pattern of the route that Astro is about to run, not by the address
 * as typed, so that no spelling of an address can reach a route under another rule.
 */
export function routeNeed(method: string, pattern: string): RouteNeed {
  const rules = RULES.filter((rule) => isUnder(pattern, rule.under)).toSorted(
    (one, other) => other.under.length - one.under.length,
  );
  const rule = rules.find((candidate) => candidate.methods.includes(method));
  if (rule !== undefined) return { kind: 'open', need: rule.need };
  if (rules.length === 0) return { kind: 'no such route' };
  return { kind: 'no such method', allowed: [...new Set(rules.flatMap((candidate) => candidate.methods))] };
}

// the Board's own rule is for itself alone: were '/' a start like the others, it would open every route
const isUnder = (pattern: string, start: string): boolean =>
  pattern === start || (start !== '/' && pattern.startsWith(`${start}/`));
