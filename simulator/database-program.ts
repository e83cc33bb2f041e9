import { execFile } from 'node:child_process';
import { existsSync } from 'node:fs';
import { rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);

/** The server refuses to run as root unless told so; as anyone else it must not be told. */
export const asUser: readonly string[] = process.getuid?.() === 0 ? ['--user=root'] : [];

/** Where Debian puts a program of the database server, or its bare name for the search path. */
export const databaseProgram = (name: string): string =>
  ['/usr/sbin', '/usr/bin', '/usr/local/sbin', '/usr/local/bin']
    .map((folder) => join(folder, name))
    .find((path) => existsSync(path)) ?? name;

/** A server clears its folder for temporary tables when it starts, so that two may never share one. */
export type ServerFolders = { readonly dataDir: string; readonly tmpDir: string };

/** Makes an empty server's data folder; one that was left half made is made anew. */
export async function installDatabase({ dataDir, tmpDir }: ServerFolders): Promise<void> {
  if (existsSync(join(dataDir, 'mysql'))) return;
  const half = `${dataDir}.half`;
  await rm(half, { recursive: true, force: true });
  await run(databaseProgram('mariadb-install-db'), [
    '--no-defaults',
    `--datadir=${half}`,
    `--tmpdir=${tmpDir}`,
    '--auth-root-authentication-method=normal',
    '--skip-test-db',
    '--skip-name-resolve',
    ...asUser,
  ]).catch((error: Error & { stderr?: string }) => {
    throw new Error(`The database's folder could not be made: ${error.stderr || error.message}`, {
      cause: error,
    });
  });
  await rm(dataDir, { recursive: true, force: true });
  await rename(half, dataDir);
}

/** Command line of a private server: loopback only, small, and durable at every commit. */
export const serverArguments = (
  server: ServerFolders & { readonly port: number; readonly initFile: string },
): readonly string[] => [
  '--no-defaults',
  `--datadir=${server.dataDir}`,
  `--tmpdir=${server.tmpDir}`,
  '--bind-address=127.0.0.1',
  `--port=${server.port}`,
  // Relative to the data folder: a socket's path may not be longer than about 100 characters.
  '--socket=server.sock',
  `--pid-file=${join(server.dataDir, 'server.pid')}`,
  '--skip-name-resolve',
  '--skip-log-bin',
  '--default-time-zone=+00:00',
  `--init-file=${server.initFile}`,
  '--character-set-server=utf8mb4',
  '--collation-server=utf8mb4_general_ci',
  '--innodb-log-file-size=48M',
  '--innodb-buffer-pool-size=192M',
  '--max-connections=200',
  ...asUser,
];
