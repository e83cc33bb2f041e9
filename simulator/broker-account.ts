import { timingSafeEqual, createHash, randomBytes } from 'node:crypto';
import { z } from 'zod';
import { measurementTopic, presenceTopic } from '../src/contract/feed';
import type { NewLine } from '../src/contract/register';
import { demoLines } from './network/demo-lines';

/** Who may come to the broker, and as what. A terminal's user name is `<line>/<terminal>`. */
export const brokerAccountSchema = z.object({
  username: z.string().min(1),
  password: z.string().min(1),
  kind: z.enum(['terminal', 'ingest', 'web']),
});
export type BrokerAccount = z.infer<typeof brokerAccountSchema>;

const RESULTS = 'tareline/result/';
const FEED = 'feed/';

/** A terminal publishes its own two topics, the worker its results, and nobody anything else. */
export function mayPublish(account: BrokerAccount, topic: string): boolean {
  switch (account.kind) {
    case 'terminal': {
      const [line, terminal, ...rest] = account.username.split('/');
      if (line === undefined || terminal === undefined || rest.length > 0) return false;
      return topic === measurementTopic(line, terminal) || topic === presenceTopic(line, terminal);
    }
    case 'ingest':
      return topic.startsWith(RESULTS) && topic.length > RESULTS.length;
    case 'web':
      return false;
  }
}

/** Whether an account may have a topic, or a filter of topics: the worker the feed, the web process the results. */
export function mayRead(account: BrokerAccount, filter: string): boolean {
  switch (account.kind) {
    case 'terminal':
      return false;
    case 'ingest':
      return filter.startsWith(FEED);
    case 'web':
      return filter.startsWith(RESULTS);
  }
}

/** The account that a user name and a password open, in a time that tells nothing of the password. */
export function openedAccount(
  accounts: ReadonlyMap<string, BrokerAccount>,
  username: string | undefined,
  password: Uint8Array | undefined,
): BrokerAccount | undefined {
  const account = accounts.get(username ?? '');
  const matches = timingSafeEqual(digest(account?.password ?? ''), digest(password ?? ''));
  return account !== undefined && password !== undefined && matches ? account : undefined;
}

const digest = (secret: string | Uint8Array): Buffer => createHash('sha256').update(secret).digest();

export const newPassword = (): string => randomBytes(18).toString('base64url');

/** An account for every terminal of these lines that publishes. */
export const newTerminalAccounts = (lines: readonly NewLine[]): BrokerAccount[] =>
  lines.flatMap((line) =>
    line.terminals.slice(0, line.goesBy === 'reported' ? 1 : undefined).map((terminal): BrokerAccount => ({
      username: `${line.key}/${terminal.key}`,
      password: newPassword(),
      kind: 'terminal',
    })),
  );

/** An account for every terminal of the demo network that publishes, and one each for the two processes. */
export function newDemoAccounts(): BrokerAccount[] {
  return [
    ...newTerminalAccounts(demoLines),
    { username: 'ingest', password: newPassword(), kind: 'ingest' },
    { username: 'web', password: newPassword(), kind: 'web' },
  ];
}
