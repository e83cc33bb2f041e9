import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { connect as connectSocket } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freePort } from '../simulator/ports';
import { until } from './until';

/** Debian's broker on loopback, open to anyone, forgetting everything when it ends. */
export interface Mosquitto {
  readonly url: string;
  readonly port: number;
  readonly pid: number;
  close(): Promise<void>;
}

const PROGRAM = '/usr/sbin/mosquitto';
const START_MS = 10_000;
const STOP_MS = 5_000;

/** Starts a broker of its own for a test; without a port it takes any free one. */
export async function startMosquitto(options: { readonly port?: number } = {}): Promise<Mosquitto> {
  const port = options.port ?? (await freePort());
  const dir = await mkdtemp(join(tmpdir(), 'tareline-mosquitto-'));
  const logFile = join(dir, 'broker.log');
  await writeFile(join(dir, 'broker.conf'), configuration(port, logFile));
  const child = spawn(PROGRAM, ['-c', join(dir, 'broker.conf')], { stdio: 'ignore', detached: true });
  const endWithUs = (): void => void child.kill('SIGKILL');
  process.once('exit', endWithUs);
  const close = async (): Promise<void> => {
    await ended(child);
    process.off('exit', endWithUs);
    await rm(dir, { recursive: true, force: true });
  };
  try {
    await listening(child, port, logFile);
  } catch (error) {
    await close();
    throw error;
  }
  return { url: `mqtt://127.0.0.1:${port}`, port, pid: child.pid!, close };
}

/** Its default bounds would drop QoS 1 messages that wait for an acknowledgement, so they are lifted. */
const configuration = (port: number, logFile: string): string =>
  [
    `listener ${port} 127.0.0.1`,
    'allow_anonymous true',
    'max_inflight_messages 0',
    'max_queued_messages 0',
    'persistence false',
    `log_dest file ${logFile}`,
    // started as root it would turn into a user of its own, who may not write into this folder
    ...(process.getuid?.() === 0 ? ['user root'] : []),
    '',
  ].join('\n');

async function listening(child: ChildProcess, port: number, logFile: string): Promise<void> {
  let failure: string | undefined;
  child.once('error', (error) => (failure = `${error.message}. Install Debian's package mosquitto.`));
  child.once('exit', (code) => (failure ??= `it ended with code ${code}.`));
  const answers = await until(
    async () => failure !== undefined || (await accepts(port)),
    START_MS,
    'a broker that listens',
  );
  if (failure === undefined && answers) return;
  const log = await readFile(logFile, 'utf8').catch(() => '');
  throw new Error(`mosquitto did not start: ${failure} ${log}`.trim());
}

const accepts = (port: number): Promise<boolean> =>
  new Promise((resolve) => {
    const socket = connectSocket({ port, host: '127.0.0.1' });
    socket.once('error', () => resolve(false));
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
  });

async function ended(child: ChildProcess): Promise<void> {
  if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return;
  const exit = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  child.kill('SIGTERM');
  const patience = setTimeout(() => child.kill('SIGKILL'), STOP_MS);
  await exit;
  clearTimeout(patience);
}
