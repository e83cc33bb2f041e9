import type { Role } from '../contract/role';

/** The one table of what each role may do. */
const HOLDERS = {
  'see lines': ['operator', 'engineer', 'planner', 'admin'],
  'acknowledge warnings': ['operator', 'engineer'],
  'see the register': ['engineer', 'admin'],
  'edit the register': ['engineer', 'admin'],
  'record settings': ['engineer', 'admin'],
  'replay settings': ['engineer'],
  'keep proposals': ['engineer'],
  'see margins': ['engineer', 'planner', 'admin'],
  'see forecast': ['planner', 'engineer'],
  'keep follow-ups': ['planner', 'engineer'],
  'record work': ['planner', 'engineer'],
  'see feeds': ['admin'],
} as const satisfies Readonly<Record<string, readonly Role[]>>;

export type Ability = keyof typeof HOLDERS;
export const ABILITIES = Object.keys(HOLDERS) as readonly Ability[];

export const may = (role: Role, ability: Ability): boolean =>
  (HOLDERS[ability] as readonly Role[]).includes(role);
