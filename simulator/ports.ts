import { createServer } from 'node:net';

const TRIES = 200;

/** Whether nothing listens on a loopback port; port 0 answers with one that the system picks. */
function tried(port: number): Promise<number | undefined> {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', () => resolve(undefined));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      const address = server.address();
      const free = typeof address === 'object' && address !== null ? address.port : undefined;
      server.close(() => resolve(free));
    });
  });
}

/** The preferred loopback port, or the next one up that is free and not among those already promised. */
export async function freePortFrom(preferred: number, promised: readonly number[] = []): Promise<number> {
  for (let port = preferred; port < preferred + TRIES; port++) {
    if (!promised.includes(port) && (await tried(port)) !== undefined) return port;
  }
  throw new Error(
    `The ports ${preferred} to ${preferred + TRIES - 1} are all taken; free one and start again.`,
  );
}

/** Any free loopback port. */
export async function freePort(): Promise<number> {
  const port = await tried(0);
  if (port === undefined) throw new Error('This machine gave no free port on 127.0.0.1.');
  return port;
}
