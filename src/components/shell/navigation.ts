import { may, type Ability } from '../../auth/abilities';
import type { Role } from '../../contract/role';

export interface Destination {
  readonly name: string;
  readonly path: string;
}

/** Only pages that exist. Whether a role may open a page is decided by the middleware; this only spares it dead links. */
const DESTINATIONS: readonly (Destination & { readonly need: Ability })[] = [
  { name: 'Board', path: '/', need: 'see lines' },
  { name: 'Margins', path: '/margins', need: 'see margins' },
  { name: 'Forecast', path: '/forecast', need: 'see forecast' },
  { name: 'Register', path: '/register', need: 'see the register' },
  { name: 'Feeds', path: '/feeds', need: 'see feeds' },
];

export const destinationsFor = (role: Role): readonly Destination[] =>
  DESTINATIONS.filter((destination) => may(role, destination.need));

/** A line's page belongs to the Board; every other page to the destination its address begins with. */
export function isCurrent(destination: Destination, pathname: string): boolean {
  if (destination.path === '/') return pathname === '/' || pathname.startsWith('/lines/');
  return pathname === destination.path || pathname.startsWith(`${destination.path}/`);
}
