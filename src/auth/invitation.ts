import type { Role } from '../contract/role';
import type { Store } from '../store/client';
import { findUserByEmail, insertUser } from '../store/people';
import { createOneTimeLink } from './one-time-links';

export type Invitation =
  | { readonly kind: 'invited'; readonly link: string }
  | { readonly kind: 'refused'; readonly problem: string };

/** Adds a person, who chooses a password by the link; asked again before that has happened, it makes a new link. */
export async function invite(
  store: Store,
  person: { email: string; name: string; role: Role; publicUrl: string; nowMs: number },
): Promise<Invitation> {
  const { email, name, role, publicUrl, nowMs } = person;
  const holder = await findUserByEmail(store, email);
  if (holder !== undefined && (holder.passwordHash !== null || holder.role !== role))
    return { kind: 'refused', problem: `${email} is known already, as ${holder.role}. Nothing was changed.` };
  const createdAt = new Date(nowMs);
  const userId =
    holder?.id ?? (await insertUser(store, { email, name, role, passwordHash: null, createdAt }));
  return { kind: 'invited', link: await createOneTimeLink(store, { userId, publicUrl, nowMs }) };
}
