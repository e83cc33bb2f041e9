/** The rooms of the code and what each may import: the one table that the imports are held against. */

const PURE = ['contract', 'standing', 'protection'] as const;
const DOCUMENTS = ['reports', 'mail', 'records'] as const;

export const MAY_IMPORT = {
  // Astro's own rooms. Pages load, shape and render: arithmetic comes to them through server/reading and view/.
  pages: [
    'layouts',
    'components',
    'styles',
    'actions',
    'server',
    ...DOCUMENTS,
    'view',
    'warnings',
    'auth',
    'store',
    'contract',
  ],
  layouts: ['components', 'styles', 'view', 'auth', 'contract'],
  components: ['actions', 'live', 'view', 'auth', 'contract', 'protection'],
  styles: [],
  actions: ['server', ...DOCUMENTS, 'view', 'warnings', 'auth', 'store', 'contract'],
  middleware: ['server', 'auth', 'store', 'contract', 'settings'],
  // Of the worker's room the web process takes what computes a snapshot, to judge history again. The worker knows
  // nothing of the web: they meet in the contract and in the store.
  server: ['ingest', 'live', ...DOCUMENTS, 'view', 'warnings', 'auth', 'store', ...PURE, 'settings'],
  ingest: ['view', 'warnings', 'store', ...PURE, 'settings'],
  live: ['store', 'contract', 'settings'],
  reports: ['records', 'view', 'warnings', 'store', ...PURE, 'settings'],
  mail: ['store', 'contract', 'settings'],
  records: ['view', 'store', ...PURE, 'settings'],
  view: ['warnings', 'store', ...PURE],
  warnings: ['store', ...PURE],
  auth: ['store', 'contract', 'settings'],
  store: [...PURE, 'settings'],
  // What crosses a process is said without knowing who says it; what is pure knows nothing at all.
  contract: [],
  standing: [],
  protection: [],
  settings: [],
  // types that Astro hands to every page
  env: ['server', 'auth'],
  // The stand-in site shares the wire and the store. Its plant is the independent truth: it shares nothing.
  simulator: [
    'simulator/stories',
    'simulator/network',
    'simulator/plant',
    'ingest',
    'auth',
    'store',
    'contract',
  ],
  'simulator/stories': ['simulator/network', 'simulator/plant', 'contract'],
  'simulator/network': ['simulator/plant', 'contract'],
  'simulator/plant': [],
} as const satisfies Record<string, readonly string[]>;

export type Room = keyof typeof MAY_IMPORT;

/** What a browser may be sent. Of live/ it gets the hook's own files alone. */
export const BROWSER_ROOMS: readonly string[] = [
  'components',
  'view',
  'live',
  'contract',
  'protection',
  'standing',
];
export const BROWSER_FILES_OF_LIVE: readonly string[] = ['src/live/live-stream.ts', 'src/live/use-live.ts'];

/** Packages that have one home, so that they can be replaced there. */
export const PACKAGE_HOMES: Readonly<Record<string, readonly Room[]>> = {
  'drizzle-orm': ['store'],
  mysql2: ['store', 'simulator'],
  lucia: ['auth'],
  '@lucia-auth/adapter-drizzle': ['auth'],
  '@node-rs/argon2': ['auth'],
  mqtt: ['ingest', 'live', 'simulator'],
  ws: ['live'],
  aedes: ['simulator'],
  react: ['components', 'live'],
  echarts: ['components', 'reports'],
  'echarts-for-react': ['components'],
  '@tanstack/react-query': ['components'],
};

/** Files that are started as programs, and the shared body of two of them. */
export const ENTRIES: readonly RegExp[] = [
  /(^|\/)main\.ts$/,
  /-main\.ts$/,
  /^simulator\/prepare\.mjs$/,
  /^simulator\/site-process\.ts$/,
];

/** The room of a file, by its path from the checkout's root, with or without extension. */
export function roomOf(path: string): string {
  const [top, second, third] = path.replace(/\.(ts|tsx|mjs|astro|css|d\.ts)$/, '').split('/');
  if (top === 'src') return second!.replace(/\.d$/, '');
  return top === 'simulator' && third !== undefined ? `${top}/${second}` : top!;
}

export const isRoom = (room: string): room is Room => Object.hasOwn(MAY_IMPORT, room);
