import { spawn } from 'node:child_process';
import { readdir, stat } from 'node:fs/promises';
import { join } from 'node:path';

const SOURCES = ['src', 'public', 'astro.config.mjs', 'package-lock.json'];
const BUILT = 'dist/server/entry.mjs';
const ASTRO = 'node_modules/astro/astro.js';

/** Builds the pages when they are not built, or built from older sources. */
export async function buildWhenNeeded(): Promise<void> {
  const builtMs = await modifiedMs(BUILT);
  const newest = Math.max(...(await Promise.all(SOURCES.map(newestMs))));
  if (builtMs > newest) return;
  const output: Buffer[] = [];
  const child = spawn(process.execPath, [ASTRO, 'build'], { stdio: ['ignore', 'pipe', 'pipe'] });
  child.stdout.on('data', (chunk: Buffer) => output.push(chunk));
  child.stderr.on('data', (chunk: Buffer) => output.push(chunk));
  const code = await new Promise<number | null>((resolve, reject) => {
    child.once('exit', resolve);
    child.once('error', reject);
  });
  if (code !== 0) throw new Error(`The pages could not be built:\n${Buffer.concat(output).toString('utf8')}`);
}

async function newestMs(path: string): Promise<number> {
  const entry = await stat(path);
  if (!entry.isDirectory()) return entry.mtimeMs;
  const below = await Promise.all((await readdir(path)).map((name) => newestMs(join(path, name))));
  return Math.max(0, ...below);
}

async function modifiedMs(path: string): Promise<number> {
  return stat(path).then(
    ({ mtimeMs }) => mtimeMs,
    () => 0,
  );
}
