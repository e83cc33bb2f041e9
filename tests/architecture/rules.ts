import ts from 'typescript';
import {
  BROWSER_FILES_OF_LIVE,
  BROWSER_ROOMS,
  ENTRIES,
  isRoom,
  MAY_IMPORT,
  PACKAGE_HOMES,
  roomOf,
} from './rooms';
import {
  type Import,
  importsOf,
  importsOfPart,
  lineOf,
  nodesOf,
  type ProgramPart,
  type SourceFile,
} from './source-file';

/** Each rule says what breaks it, a sentence each; none when it is kept. */

export function roomViolations(files: readonly SourceFile[]): string[] {
  return files.flatMap(importsOf).flatMap((one) => {
    const from = roomOf(one.from);
    if (!isRoom(from)) return [`${one.from} lies in no room of the table.`];
    if (!one.isOurs) return [];
    const to = roomOf(one.to);
    const allowed: readonly string[] = MAY_IMPORT[from];
    return from === to || allowed.includes(to)
      ? []
      : [`${place(one)} imports ${one.to}: ${from} may not know ${to}.`];
  });
}

export function packageViolations(files: readonly SourceFile[]): string[] {
  return files.flatMap(importsOf).flatMap((one) => {
    const home = one.isOurs ? undefined : PACKAGE_HOMES[packageOf(one.to)];
    const from = roomOf(one.from);
    return home === undefined || (home as readonly string[]).includes(from)
      ? []
      : [`${place(one)} imports the package ${one.to}, whose home is ${home.join(', ')}.`];
  });
}

const place = ({ from, line }: Pick<Import, 'from' | 'line'>): string => `${from}:${line}`;
const packageOf = (name: string): string =>
  name
    .split('/')
    .slice(0, name.startsWith('@') ? 2 : 1)
    .join('/');

const PURE_ROOMS: readonly string[] = ['protection', 'standing', 'simulator/plant'];

/** Pure rooms take nothing from outside: no package, no I/O, no clock, no randomness. */
export function purityViolations(files: readonly SourceFile[]): string[] {
  const pure = files.filter(({ path }) => PURE_ROOMS.includes(roomOf(path)));
  return [
    ...pure
      .flatMap(importsOf)
      .filter(({ isOurs }) => !isOurs)
      .map((one) => `${place(one)} imports ${one.to} into a pure room.`),
    ...uses(pure, impurity).map((use) => `${use.at} uses ${use.what} in a pure room.`),
  ];
}

const IMPURE_GLOBALS: readonly string[] = [
  'performance',
  'crypto',
  'process',
  'fetch',
  'setTimeout',
  'setInterval',
  'console',
  'globalThis',
];

function impurity(node: ts.Node): string | undefined {
  if (ts.isPropertyAccessExpression(node)) {
    const text = node.getText();
    if (text === 'Date.now' || text === 'Math.random') return text;
  }
  if (ts.isNewExpression(node) && node.expression.getText() === 'Date' && !node.arguments?.length)
    return 'new Date() without an instant';
  if (ts.isCallExpression(node) && node.expression.getText() === 'Date') return 'Date()';
  if (ts.isIdentifier(node) && IMPURE_GLOBALS.includes(node.text) && isFreeUse(node)) return node.text;
  return undefined;
}

/** Whether an identifier is used for its value, and is not the name of a member or of something declared. */
function isFreeUse(node: ts.Identifier): boolean {
  const { parent } = node;
  if (ts.isPropertyAccessExpression(parent)) return parent.expression === node;
  return ts.isExpression(parent) || ts.isExpressionStatement(parent) || ts.isReturnStatement(parent)
    ? true
    : ts.isVariableDeclaration(parent) && parent.initializer === node;
}

export const environmentViolations = (files: readonly SourceFile[]): string[] =>
  uses(
    files.filter(({ path }) => path.startsWith('src/') && path !== 'src/settings.ts'),
    (node) => (isMemberOfProcess(node, 'env') ? 'process.env' : undefined),
  ).map((use) => `${use.at} reads ${use.what}: only src/settings.ts reads the environment.`);

export const exitViolations = (files: readonly SourceFile[]): string[] =>
  uses(
    files.filter(({ path }) => !ENTRIES.some((entry) => entry.test(path))),
    (node) =>
      isMemberOfProcess(node, 'exit') || isMemberOfProcess(node, 'exitCode') ? 'process.exit' : undefined,
  ).map((use) => `${use.at} says ${use.what}: only an entry file ends its process.`);

function isMemberOfProcess(node: ts.Node, member: string): boolean {
  if (ts.isPropertyAccessExpression(node))
    return node.expression.getText() === 'process' && node.name.text === member;
  return (
    ts.isElementAccessExpression(node) &&
    node.expression.getText() === 'process' &&
    ts.isStringLiteralLike(node.argumentExpression) &&
    node.argumentExpression.text === member
  );
}

function uses(
  files: readonly SourceFile[],
  what: (node: ts.Node) => string | undefined,
): { at: string; what: string }[] {
  return files.flatMap(({ path, parts }) =>
    parts.flatMap((program) =>
      [...nodesOf(program.tree)].flatMap((node) => {
        const found = what(node);
        return found === undefined ? [] : [{ at: `${path}:${lineOf(program, node)}`, what: found }];
      }),
    ),
  );
}

/** A file that only hands on what others export hides who knows whom. */
export function barrelViolations(files: readonly SourceFile[]): string[] {
  return files
    .filter(({ path, parts }) => !path.endsWith('.astro') && parts.some(isBarrel))
    .map(({ path }) => `${path} only hands on what other files export.`);
}

function isBarrel({ tree }: ProgramPart): boolean {
  const handsOn = (statement: ts.Statement) =>
    ts.isExportDeclaration(statement) && statement.moduleSpecifier !== undefined;
  return (
    tree.statements.some(handsOn) &&
    tree.statements.every((one) => handsOn(one) || ts.isImportDeclaration(one))
  );
}

/** What a browser gets, follows from what its islands and scripts import; none of that may be a server's. */
export function browserViolations(files: readonly SourceFile[]): string[] {
  const byName = new Map(files.map((file) => [file.path.replace(/\.(ts|tsx)$/, ''), file]));
  const seen = new Set<string>();
  const violations: string[] = [];
  const follow = (imports: readonly Import[], from: string): void => {
    for (const one of imports.filter(({ isTypeOnly }) => !isTypeOnly)) {
      const way = `${from} → ${one.to}`;
      const problem = browserProblem(one, byName.get(one.to));
      if (problem !== undefined)
        violations.push(`${place(one)} brings ${one.to} to the browser, ${problem} (${way}).`);
      const next = byName.get(one.to);
      if (problem !== undefined || next === undefined || seen.has(next.path)) continue;
      seen.add(next.path);
      follow(importsOf(next), way);
    }
  };
  for (const file of files) {
    if (file.path.endsWith('.tsx')) follow(importsOf(file), file.path);
    for (const program of file.parts)
      if (program.reachesBrowser) follow(importsOfPart(file.path, program), file.path);
  }
  return violations;
}

function browserProblem(one: Import, file: SourceFile | undefined): string | undefined {
  if (!one.isOurs) return one.to.startsWith('node:') ? 'which has no such module' : undefined;
  const room = roomOf(one.to);
  if (!BROWSER_ROOMS.includes(room)) return `where ${room} has no place`;
  if (room === 'live' && file !== undefined && !BROWSER_FILES_OF_LIVE.includes(file.path))
    return 'where the server’s end of the stream has no place';
  return undefined;
}

/** Islands know what a browser may know, types as well; the hook's own files know the contract alone. */
export function islandViolations(files: readonly SourceFile[]): string[] {
  const islands = files
    .filter(({ path }) => path.endsWith('.tsx'))
    .flatMap(importsOf)
    .filter(({ isOurs, to }) => isOurs && !BROWSER_ROOMS.includes(roomOf(to)))
    .map((one) => `${place(one)} imports ${one.to}: an island may not know ${roomOf(one.to)}.`);
  const hook = files
    .filter(({ path }) => BROWSER_FILES_OF_LIVE.includes(path))
    .flatMap(importsOf)
    .filter(
      ({ isOurs, to }) => isOurs && roomOf(to) !== 'contract' && !BROWSER_FILES_OF_LIVE.includes(`${to}.ts`),
    )
    .map((one) => `${place(one)} imports ${one.to}: the browser’s hook knows the contract alone.`);
  return [...islands, ...hook];
}
