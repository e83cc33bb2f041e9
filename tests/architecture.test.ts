import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { MAY_IMPORT } from './architecture/rooms';
import {
  barrelViolations,
  browserViolations,
  environmentViolations,
  exitViolations,
  islandViolations,
  packageViolations,
  purityViolations,
  roomViolations,
} from './architecture/rules';
import { importsOf, sourceFile, sourceFiles } from './architecture/source-file';

const ROOT = fileURLToPath(new URL('..', import.meta.url)).replace(/\/$/, '');
const FILES = sourceFiles(ROOT, ['src', 'simulator']);

describe('the code', () => {
  it.each([
    ['every import goes to a room that the importing one may know', roomViolations],
    ['every package that has a home is imported there alone', packageViolations],
    [
      'protection, standing and the plant take nothing from outside: no package, clock, randomness or I/O',
      purityViolations,
    ],
    ['only settings.ts reads the environment', environmentViolations],
    ['only an entry file ends its process', exitViolations],
    ['no file only hands on what others export', barrelViolations],
    ['an island knows what a browser may know', islandViolations],
    ['nothing of a server follows from what the browser imports', browserViolations],
  ])('keeps its rule: %s', (_, violationsOf) => {
    expect(violationsOf(FILES)).toEqual([]);
  });

  it('is read whole: every room that exists so far has files', () => {
    expect(FILES.length).toBeGreaterThan(200);
    for (const path of [
      'src/protection/phasor.ts',
      'src/pages/index.astro',
      'src/middleware.ts',
      'simulator/prepare.mjs',
    ])
      expect(FILES.map((file) => file.path)).toContain(path);
  });
});

describe('the table of rooms', () => {
  const table: Readonly<Record<string, readonly string[]>> = MAY_IMPORT;

  it('goes one way: no room is known, through whatever others, by one that it may know', () => {
    const below = (room: string, seen = new Set<string>()): Set<string> => {
      for (const next of table[room] ?? []) if (!seen.has(next)) below(next, seen.add(next));
      return seen;
    };
    expect(Object.keys(table).filter((room) => below(room).has(room))).toEqual([]);
  });

  it('lets ingest and live meet through others only', () => {
    expect(table['ingest']).not.toContain('live');
    expect(table['live']).not.toContain('ingest');
  });
});

describe('the scan', () => {
  const found = (path: string, text: string) =>
    importsOf(sourceFile(path, text)).map(
      ({ line, to, isTypeOnly }) => `${line} ${isTypeOnly ? 'type ' : ''}${to}`,
    );

  it('finds an import however it is written, and knows which needs types alone', () => {
    const text = [
      "import { a } from './a';",
      "import type { B } from '../b';",
      "import { type C, type D } from '../store/c';",
      "import e, { type F } from 'e';",
      "import './g.css';",
      "export { h } from './h';",
      "export type { I } from './i';",
      "export * from './j';",
      "const k = await import('./k');",
      "let l: import('./l').L;",
      "const m = require('./m');",
      "// import n from './n';",
      'const o = "import p from \'./p\'";',
      'const q = await import(r);',
    ].join('\n');
    expect(found('src/view/x.ts', text)).toEqual([
      '1 src/view/a',
      '2 type src/b',
      '3 type src/store/c',
      '4 e',
      '5 src/view/g.css',
      '6 src/view/h',
      '7 type src/view/i',
      '8 src/view/j',
      '9 src/view/k',
      '10 type src/view/l',
      '11 src/view/m',
    ]);
  });

  it('finds the imports of front matter and scripts of an .astro file', () => {
    const text = [
      '---',
      "import X from '../components/X.astro';",
      '---',
      '<X />',
      '<script>',
      "  import '../view/y';",
      '</script>',
    ].join('\n');
    expect(found('src/pages/index.astro', text)).toEqual(['2 src/components/X', '6 src/view/y']);
  });
});

describe('a broken rule', () => {
  const broken: [
    string,
    (files: Parameters<typeof roomViolations>[0]) => string[],
    string,
    string,
    string,
  ][] = [
    [
      'of rooms',
      roomViolations,
      'src/protection/x.ts',
      "import type { A } from '../contract/feed';",
      'src/protection/x.ts:1 imports src/contract/feed: protection may not know contract.',
    ],
    [
      'of rooms, between worker and stream',
      roomViolations,
      'src/ingest/x.ts',
      "\nimport { a } from '../live/hub';",
      'src/ingest/x.ts:2 imports src/live/hub: ingest may not know live.',
    ],
    [
      'of rooms, by the plant',
      roomViolations,
      'simulator/plant/x.ts',
      "import { a } from '../../src/protection/phasor';",
      'simulator/plant/x.ts:1 imports src/protection/phasor: simulator/plant may not know protection.',
    ],
    [
      'of rooms, by a page’s front matter',
      roomViolations,
      'src/pages/x.astro',
      "---\nimport { a } from '../ingest/rung';\n---",
      'src/pages/x.astro:2 imports src/ingest/rung: pages may not know ingest.',
    ],
    [
      'of rooms, by a room that nobody drew',
      roomViolations,
      'src/utils/x.ts',
      "import 'zod';",
      'src/utils/x.ts lies in no room of the table.',
    ],
    [
      'of packages',
      packageViolations,
      'src/server/x.ts',
      "import { sql } from 'drizzle-orm/mysql-core';",
      'src/server/x.ts:1 imports the package drizzle-orm/mysql-core, whose home is store.',
    ],
    [
      'of purity, by the clock',
      purityViolations,
      'src/standing/x.ts',
      'const a = Date.now();',
      'src/standing/x.ts:1 uses Date.now in a pure room.',
    ],
    [
      'of purity, by the clock unsaid',
      purityViolations,
      'src/standing/x.ts',
      'const a = new Date();',
      'src/standing/x.ts:1 uses new Date() without an instant in a pure room.',
    ],
    [
      'of purity, by another clock',
      purityViolations,
      'src/standing/x.ts',
      'const a = performance.now();',
      'src/standing/x.ts:1 uses performance in a pure room.',
    ],
    [
      'of purity, by randomness',
      purityViolations,
      'src/protection/x.ts',
      'const a = Math.random();',
      'src/protection/x.ts:1 uses Math.random in a pure room.',
    ],
    [
      'of purity, by I/O',
      purityViolations,
      'src/protection/x.ts',
      "import 'node:fs';",
      'src/protection/x.ts:1 imports node:fs into a pure room.',
    ],
    [
      'of the environment',
      environmentViolations,
      'src/store/x.ts',
      "const a = process['env'].HOME;",
      'src/store/x.ts:1 reads process.env: only src/settings.ts reads the environment.',
    ],
    [
      'of exits',
      exitViolations,
      'src/server/x.ts',
      'process.exit(1);',
      'src/server/x.ts:1 says process.exit: only an entry file ends its process.',
    ],
    [
      'of barrels',
      barrelViolations,
      'src/view/x.ts',
      "import './z';\nexport { a } from './a';\nexport * from './b';",
      'src/view/x.ts only hands on what other files export.',
    ],
    [
      'of islands',
      islandViolations,
      'src/components/X.tsx',
      "import type { Store } from '../store/client';",
      'src/components/X.tsx:1 imports src/store/client: an island may not know store.',
    ],
    [
      'of the hook',
      islandViolations,
      'src/live/use-live.ts',
      "import { a } from '../view/a';",
      'src/live/use-live.ts:1 imports src/view/a: the browser’s hook knows the contract alone.',
    ],
    [
      'of scripts',
      browserViolations,
      'src/pages/x.astro',
      "<script>import { a } from '../auth/sessions';</script>",
      'src/pages/x.astro:1 brings src/auth/sessions to the browser, where auth has no place (src/pages/x.astro → src/auth/sessions).',
    ],
  ];

  it.each(broken)('%s is told in a sentence', (_, violationsOf, path, text, sentence) => {
    expect(violationsOf([sourceFile(path, text)])).toEqual([sentence]);
  });

  it('of the browser is told with the way by which it comes about, types left aside', () => {
    const files = [
      sourceFile(
        'src/components/X.tsx',
        "import { y } from '../view/y';\nimport type { Z } from '../view/z';",
      ),
      sourceFile('src/view/y.ts', "import { w } from './w';"),
      sourceFile('src/view/w.ts', "import { rows } from '../store/rows';"),
      sourceFile('src/view/z.ts', "import { rows } from '../store/rows';"),
    ];
    expect(browserViolations(files)).toEqual([
      'src/view/w.ts:1 brings src/store/rows to the browser, where store has no place (src/components/X.tsx → src/view/y → src/view/w → src/store/rows).',
    ]);
  });

  it('is not seen where there is none', () => {
    const text = [
      "import { a } from './a';",
      'const at = new Date(atMs);',
      'const { performance: figure } = machine;',
      'const b = line.process;',
      "/** Date.now() */ const c = 'Math.random()';",
    ].join('\n');
    const files = [sourceFile('src/protection/x.ts', text)];
    expect(
      [roomViolations, purityViolations, exitViolations, barrelViolations].flatMap((rule) => rule(files)),
    ).toEqual([]);
  });
});
