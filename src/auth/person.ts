import type { Role } from '../contract/role';

/** Whoever is signed in. */
export interface Person {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly role: Role;
}
