import { type Ability, may } from './abilities';
import type { Person } from './person';
import { refusal } from './refusal';

interface Guarded {
  readonly locals: { readonly person: Person | undefined };
}

/**
 * The second lock, inside every endpoint: undefined when the person may, else the answer to give at once.
 * The middleware's table is the first; an endpoint that is moved or forgotten there stays shut by this one.
 */
export function requireAbility(context: Guarded, ability: Ability): Response | undefined {
  const { person } = context.locals;
  if (person === undefined) return refusal(401, 'Sign in first.');
  if (!may(person.role, ability)) return refusal(403, roleSentence(person, ability));
  return undefined;
}

export const roleSentence = (person: Person, ability: Ability): string =>
  `Your role, ${person.role}, may not ${ability}.`;
