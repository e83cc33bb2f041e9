import type { Role } from '../src/contract/role';

/** An invented person; the password opens the demo only, which answers on this machine alone. */
export type DemoPerson = {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly password: string;
};

export const demoPeople: readonly DemoPerson[] = [
  {
    name: 'Ida Brandt',
    email: 'ida.brandt@skelder.example',
    role: 'operator',
    password: 'lamps-over-the-weir',
  },
  {
    name: 'Jonas Wehrli',
    email: 'jonas.wehrli@skelder.example',
    role: 'engineer',
    password: 'seven-quiet-relays',
  },
  {
    name: 'Mira Solano',
    email: 'mira.solano@skelder.example',
    role: 'planner',
    password: 'tuesdays-by-the-tarn',
  },
  {
    name: 'Tomas Okafor',
    email: 'tomas.okafor@skelder.example',
    role: 'admin',
    password: 'gate-keys-on-the-hook',
  },
];
