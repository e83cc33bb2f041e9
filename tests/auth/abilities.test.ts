import { describe, expect, it } from 'vitest';
import { ABILITIES, may } from '../../src/auth/abilities';
import { requireAbility } from '../../src/auth/guard';
import { routeNeed } from '../../src/auth/routes';
import { problemSchema } from '../../src/contract/problem';
import { ROLES, type Role } from '../../src/contract/role';

const TABLE: Readonly<Record<Role, readonly string[]>> = {
  operator: ['see lines', 'acknowledge warnings'],
  engineer: [
    'see lines',
    'acknowledge warnings',
    'see the register',
    'edit the register',
    'record settings',
    'replay settings',
    'keep proposals',
    'see margins',
    'see forecast',
    'keep follow-ups',
    'record work',
  ],
  planner: ['see lines', 'see margins', 'see forecast', 'keep follow-ups', 'record work'],
  admin: [
    'see lines',
    'see the register',
    'edit the register',
    'record settings',
    'see margins',
    'see feeds',
  ],
};

describe('the table of roles', () => {
  it.each(ROLES)('gives the %s what the role is for and nothing else', (role) => {
    expect(ABILITIES.filter((ability) => may(role, ability))).toEqual(TABLE[role]);
  });
});

describe('the guard of an endpoint', () => {
  const person = (role: Role) => ({ id: 'p1', email: 'p@example.org', name: 'P', role });

  it('lets a person through whose role may', () => {
    expect(
      requireAbility({ locals: { person: person('operator') } }, 'acknowledge warnings'),
    ).toBeUndefined();
  });
  it('answers 401 to somebody signed out', async () => {
    const response = requireAbility({ locals: { person: undefined } }, 'see lines');
    expect(response?.status).toBe(401);
    expect(problemSchema.parse(await response?.json()).problem).toBe('Sign in first.');
  });
  it('answers 403 to a role that may not, naming both', async () => {
    const response = requireAbility({ locals: { person: person('planner') } }, 'edit the register');
    expect(response?.status).toBe(403);
    expect(problemSchema.parse(await response?.json()).problem).toBe(
      'Your role, planner, may not edit the register.',
    );
  });
});

describe('the table of routes', () => {
  const need = (method: string, pattern: string) => {
    const route = routeNeed(method, pattern);
    return route.kind === 'open' ? route.need : route.kind;
  };

  it.each([
    ['GET', '/', 'see lines'],
    ['GET', '/lines/[key]', 'see lines'],
    ['GET', '/register', 'see the register'],
    ['GET', '/register/[key]', 'see the register'],
    ['GET', '/register/new', 'edit the register'],
    ['POST', '/register/[key]', 'edit the register'],
    ['GET', '/feeds', 'see feeds'],
    ['GET', '/margins', 'see margins'],
    ['GET', '/forecast', 'see forecast'],
    ['GET', '/api/lines', 'see lines'],
    ['GET', '/api/margins/scatter', 'see margins'],
    ['GET', '/api/follow-ups', 'see forecast'],
    ['POST', '/api/follow-ups', 'keep follow-ups'],
    ['POST', '/api/follow-ups/[id]/done', 'keep follow-ups'],
    ['GET', '/api/works', 'see lines'],
    ['POST', '/api/works', 'record work'],
    ['POST', '/api/works/[id]/withdrawn', 'record work'],
    ['GET', '/api/lines/[key]/snapshots', 'see lines'],
    ['GET', '/api/warnings', 'see lines'],
    ['POST', '/api/warnings/[id]/acknowledge', 'acknowledge warnings'],
    ['GET', '/api/feed', 'see feeds'],
    ['GET', '/api/feed/refusals', 'see feeds'],
    ['GET', '/api/register/lines', 'see the register'],
    ['POST', '/api/register/lines', 'edit the register'],
    ['PATCH', '/api/register/lines/[key]', 'edit the register'],
    ['POST', '/api/register/lines/[key]/terminals', 'edit the register'],
    ['POST', '/api/register/lines/[key]/settings', 'record settings'],
    ['DELETE', '/api/register/lines/[key]/terminals/[terminal]', 'edit the register'],
    ['GET', '/sign-in', 'nothing'],
    ['POST', '/sign-in', 'nothing'],
    ['GET', '/welcome/[token]', 'nothing'],
    ['POST', '/api/sign-in', 'nothing'],
    ['POST', '/api/sign-out', 'nothing'],
  ])('asks at %s %s for: %s', (method, pattern, expected) => {
    expect(need(method, pattern)).toBe(expected);
  });
  it('is closed to whatever it does not name', () => {
    expect(need('GET', '/people')).toBe('no such route');
    expect(need('GET', '/linesmen')).toBe('no such route');
    expect(need('POST', '/_actions/[...path]')).toBe('no such route');
    expect(need('DELETE', '/api/lines/[key]')).toBe('no such method');
    expect(need('POST', '/')).toBe('no such method');
    expect(need('POST', '/api/lines')).toBe('no such method');
  });
});
