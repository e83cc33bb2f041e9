import type { Store } from '../store/client';
import { findUserByEmail, insertUser, readAdmins, renameUser } from '../store/people';
import { createOneTimeLink } from './one-time-links';

export type FirstAdmin =
  { readonly kind: 'made'; readonly link: string } | { readonly kind: 'refused'; readonly problem: string };

/**
 * Makes the first admin of an installation, who chooses a password by the link. Asked again before that has
 * happened, it corrects the admin's name and address and makes a new link: the first may have been mistyped or lost.
 */
export async function makeFirstAdmin(
  store: Store,
  admin: { email: string; name: string; publicUrl: string; nowMs: number },
): Promise<FirstAdmin> {
  const { email, name, publicUrl, nowMs } = admin;
  const admins = await readAdmins(store);
  const settled = admins.find((other) => other.passwordHash !== null);
  if (settled !== undefined)
    return { kind: 'refused', problem: `There is an admin already: ${settled.email}. Nothing was changed.` };
  const [waiting] = admins;
  const holder = await findUserByEmail(store, email);
  if (holder !== undefined && holder.id !== waiting?.id)
    return {
      kind: 'refused',
      problem: `${email} belongs to the ${holder.role} ${holder.name}. Nothing was changed.`,
    };
  if (waiting !== undefined) await renameUser(store, waiting.id, { email, name });
  const userId =
    waiting?.id ??
    (await insertUser(store, { email, name, role: 'admin', passwordHash: null, createdAt: new Date(nowMs) }));
  return { kind: 'made', link: await createOneTimeLink(store, { userId, publicUrl, nowMs }) };
}
