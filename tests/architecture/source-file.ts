import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, normalize } from 'node:path';
import ts from 'typescript';

/** One import of one file, however it is written. */
export interface Import {
  readonly from: string;
  readonly line: number;
  /** a path from the checkout's root for our own files, without extension; a package's name for others */
  readonly to: string;
  readonly isOurs: boolean;
  /** gone when the program runs: it needs the types alone */
  readonly isTypeOnly: boolean;
}

/** A file of the checkout with the parts of it that are programs. */
export interface SourceFile {
  readonly path: string;
  readonly parts: readonly ProgramPart[];
}

/** A program in TypeScript; of an .astro file the front matter and each script are one. */
export interface ProgramPart {
  readonly tree: ts.SourceFile;
  /** how many lines of the file stand before it */
  readonly lineOffset: number;
  readonly reachesBrowser: boolean;
}

const SOURCE = /\.(ts|tsx|mjs|astro)$/;

/** Every source file below these folders of the checkout. */
export function sourceFiles(root: string, folders: readonly string[]): SourceFile[] {
  const paths = folders.flatMap((folder) =>
    readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile() && SOURCE.test(entry.name))
      .map((entry) => join(entry.parentPath, entry.name).slice(root.length + 1)),
  );
  return paths.sort().map((path) => sourceFile(path, readFileSync(join(root, path), 'utf8')));
}

export function sourceFile(path: string, text: string): SourceFile {
  if (!path.endsWith('.astro'))
    return { path, parts: [part(path, text, { lineOffset: 0, reachesBrowser: false })] };
  const frontMatter = /^\s*---\r?\n([\s\S]*?)\r?\n---/.exec(text);
  const scripts = [...text.matchAll(/<script\b([^>]*)>([\s\S]*?)<\/script>/g)];
  return {
    path,
    parts: [
      ...(frontMatter === null
        ? []
        : [part(path, frontMatter[1]!, { lineOffset: 1, reachesBrowser: false })]),
      ...scripts.map((script) =>
        part(path, script[2]!, {
          lineOffset: linesBefore(text, script.index + script[0].indexOf('>') + 1),
          reachesBrowser: true,
        }),
      ),
    ],
  };
}

const linesBefore = (text: string, index: number): number => text.slice(0, index).split('\n').length - 1;

function part(
  path: string,
  text: string,
  rest: { lineOffset: number; reachesBrowser: boolean },
): ProgramPart {
  const kind = path.endsWith('.tsx') ? ts.ScriptKind.TSX : ts.ScriptKind.TS;
  return { tree: ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true, kind), ...rest };
}

/** Every node of a program, from the outside in. */
export function* nodesOf(node: ts.Node): Generator<ts.Node> {
  yield node;
  const children: ts.Node[] = [];
  ts.forEachChild(node, (child) => void children.push(child));
  for (const child of children) yield* nodesOf(child);
}

export const lineOf = ({ tree, lineOffset }: ProgramPart, node: ts.Node): number =>
  tree.getLineAndCharacterOfPosition(node.getStart(tree)).line + 1 + lineOffset;

export const importsOf = ({ path, parts }: SourceFile): Import[] =>
  parts.flatMap((program) => importsOfPart(path, program));

export function importsOfPart(path: string, program: ProgramPart): Import[] {
  return [...nodesOf(program.tree)].flatMap((node) => {
    const found = importOf(node);
    if (found === undefined) return [];
    const isOurs = found.to.startsWith('.');
    const to = isOurs
      ? normalize(join(dirname(path), found.to)).replace(/\.(ts|tsx|mjs|astro)$/, '')
      : found.to;
    return [{ from: path, line: lineOf(program, node), to, isOurs, isTypeOnly: found.isTypeOnly }];
  });
}

function importOf(node: ts.Node): { to: string; isTypeOnly: boolean } | undefined {
  if (ts.isImportDeclaration(node)) return named(node.moduleSpecifier, isTypeOnlyClause(node.importClause));
  if (ts.isExportDeclaration(node) && node.moduleSpecifier !== undefined) {
    const elements =
      node.exportClause && ts.isNamedExports(node.exportClause) ? node.exportClause.elements : [];
    const allTypes = elements.length > 0 && elements.every(({ isTypeOnly }) => isTypeOnly);
    return named(node.moduleSpecifier, node.isTypeOnly || allTypes);
  }
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument))
    return named(node.argument.literal, true);
  if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword)
    return named(node.arguments[0], false);
  if (ts.isCallExpression(node) && ts.isIdentifier(node.expression) && node.expression.text === 'require')
    return named(node.arguments[0], false);
  return undefined;
}

function isTypeOnlyClause(clause: ts.ImportClause | undefined): boolean {
  if (clause === undefined) return false;
  if (clause.isTypeOnly) return true;
  const { name, namedBindings } = clause;
  if (name !== undefined || namedBindings === undefined || !ts.isNamedImports(namedBindings)) return false;
  return namedBindings.elements.length > 0 && namedBindings.elements.every(({ isTypeOnly }) => isTypeOnly);
}

/** A name that is worked out while the program runs can't be told from its text. */
const named = (
  specifier: ts.Node | undefined,
  isTypeOnly: boolean,
): { to: string; isTypeOnly: boolean } | undefined =>
  specifier !== undefined && ts.isStringLiteralLike(specifier)
    ? { to: specifier.text, isTypeOnly }
    : undefined;
