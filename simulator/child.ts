import { type ChildProcess, spawn } from 'node:child_process';

/** One process of the site, started and ended by us. */
export interface Child {
  readonly name: string;
  /** settles when the process has ended, with how it ended */
  readonly ended: Promise<string>;
  stop(): Promise<void>;
}

const PATIENCE_MS = 15_000;

interface ChildProgram {
  readonly name: string;
  readonly arguments: readonly string[];
  readonly environment?: Readonly<Record<string, string>>;
  /** says by a message when it is up; otherwise it counts as up once it is spawned */
  readonly tellsReady: boolean;
}

/** Starts a Node program as a process of the site. Ctrl-C is for us alone, who stop all in order. */
export async function startChild(program: ChildProgram): Promise<Child> {
  const child = spawn(process.execPath, [...program.arguments], {
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    env: { ...process.env, ...program.environment },
    detached: true,
  });
  const ended = new Promise<string>((resolve) => {
    child.once('exit', (code, signal) => resolve(signal ?? `code ${code}`));
    child.once('error', (error) => resolve(error.message));
  });
  const endWithUs = () => void child.kill('SIGTERM');
  process.once('exit', endWithUs);
  void ended.then(() => process.off('exit', endWithUs));
  if (program.tellsReady) await readyMessage(child, program.name, ended);
  return {
    name: program.name,
    ended,
    async stop() {
      child.kill('SIGTERM');
      const patience = setTimeout(() => child.kill('SIGKILL'), PATIENCE_MS);
      await ended;
      clearTimeout(patience);
    },
  };
}

async function readyMessage(child: ChildProcess, name: string, ended: Promise<string>): Promise<void> {
  const ready = new Promise<'ready'>((resolve) => child.once('message', () => resolve('ready')));
  const first = await Promise.race([ready, ended]);
  if (first !== 'ready')
    throw new Error(`The ${name} ended while starting (${first}); what it said stands above.`);
}
