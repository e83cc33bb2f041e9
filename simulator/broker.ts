import { createServer, type Socket } from 'node:net';
import { Aedes, type AuthenticateError, type AedesOptions, type Client } from 'aedes';
import { type BrokerAccount, mayPublish, mayRead, openedAccount } from './broker-account';

/** The stand-in site's broker: MQTT 3.1.1 on loopback, sessions kept in memory. */
export type Broker = { readonly port: number; readonly url: string; close(): Promise<void> };

export const BROKER_LIMITS = {
  /** deliveries under way at once: far above the connections of the demo and of the benches */
  concurrency: 4_000,
  connectTimeoutMs: 10_000,
  /** a reader that takes nothing for this long is let go; its session keeps what waits */
  drainTimeoutMs: 60_000,
} as const;

/** Starts a broker on a loopback port; 0 lets the system pick. It fails with a sentence when the port is taken. */
export async function startBroker(options: {
  readonly port: number;
  readonly accounts: readonly BrokerAccount[];
}): Promise<Broker> {
  const aedes = await Aedes.createBroker({
    concurrency: BROKER_LIMITS.concurrency,
    connectTimeout: BROKER_LIMITS.connectTimeoutMs,
    drainTimeout: BROKER_LIMITS.drainTimeoutMs,
    ...rulesFor(options.accounts),
  });
  const server = createServer((socket: Socket) => void aedes.handle(socket));
  await new Promise<void>((resolve, reject) => {
    server.once('error', (error) =>
      reject(new Error(`The broker cannot listen on port ${options.port}: ${error.message}`)),
    );
    server.listen(options.port, '127.0.0.1', resolve);
  });
  const { port } = server.address() as { port: number };
  return {
    port,
    url: `mqtt://127.0.0.1:${port}`,
    close: async () => {
      const closed = new Promise<void>((resolve) => server.close(() => resolve()));
      await new Promise<void>((resolve) => aedes.close(resolve));
      await closed;
    },
  };
}

type Rules = Required<
  Pick<AedesOptions, 'authenticate' | 'authorizePublish' | 'authorizeSubscribe' | 'authorizeForward'>
>;

function rulesFor(known: readonly BrokerAccount[]): Rules {
  const accounts = new Map(known.map((account) => [account.username, account]));
  const opened = new WeakMap<Client, BrokerAccount>();
  // A kept session is reached by its client id, so an id belongs to the account that used it first.
  const idOwners = new Map<string, string>();
  const accountOf = (client: Client | null): BrokerAccount | undefined =>
    client === null ? undefined : opened.get(client);
  return {
    // eslint-disable-next-line max-params -- the broker's own signature
    authenticate(client, username, password, done) {
      const account = openedAccount(accounts, username, password);
      if (account === undefined) return done(refusal('Wrong user name or password.', 4), false);
      if ((idOwners.get(client.id) ?? account.username) !== account.username)
        return done(refusal('This client id belongs to another account.', 2), false);
      idOwners.set(client.id, account.username);
      opened.set(client, account);
      done(null, true);
    },
    authorizePublish(client, packet, done) {
      const account = accountOf(client);
      const allowed = account !== undefined && mayPublish(account, packet.topic);
      done(allowed ? null : new Error(`${account?.username ?? 'Nobody'} may not publish ${packet.topic}.`));
    },
    authorizeSubscribe(client, subscription, done) {
      const account = accountOf(client);
      done(null, account !== undefined && mayRead(account, subscription.topic) ? subscription : null);
    },
    authorizeForward(client, packet) {
      const account = accountOf(client);
      return account !== undefined && mayRead(account, packet.topic) ? packet : null;
    },
  };
}

const refusal = (message: string, returnCode: number): AuthenticateError =>
  Object.assign(new Error(message), { returnCode }) as AuthenticateError;
