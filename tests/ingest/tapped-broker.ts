import { connect as connectSocket, createServer, type AddressInfo, type Socket } from 'node:net';

/** A way to a broker that counts the acknowledgements which pass. */
export interface TappedBroker {
  readonly url: string;
  acknowledgedCount(): number;
  close(): Promise<void>;
}

const PUBACK = Buffer.from([0x40, 0x02]);

/** Opens a way to the broker at a port. Counts in the bytes: none of what a worker publishes holds these two. */
export async function tapBroker(port: number): Promise<TappedBroker> {
  let acknowledged = 0;
  const sockets = new Set<Socket>();
  const server = createServer((near) => {
    const far = connectSocket(port, '127.0.0.1');
    for (const socket of [near, far]) {
      sockets.add(socket);
      socket.on('error', () => undefined);
      socket.on('close', () => {
        sockets.delete(socket);
        near.destroy();
        far.destroy();
      });
    }
    let rest = Buffer.alloc(0);
    near.on('data', (chunk) => {
      const bytes = Buffer.concat([rest, chunk]);
      for (let at = bytes.indexOf(PUBACK); at >= 0; at = bytes.indexOf(PUBACK, at + 1)) acknowledged += 1;
      rest = bytes.subarray(bytes.length - (bytes.at(-1) === PUBACK[0] ? 1 : 0));
      far.write(chunk);
    });
    far.pipe(near);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    url: `mqtt://127.0.0.1:${(server.address() as AddressInfo).port}`,
    acknowledgedCount: () => acknowledged,
    async close() {
      for (const socket of sockets) socket.destroy();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}
