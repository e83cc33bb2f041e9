import { startBroker } from '../../simulator/broker';
import type { BrokerAccount } from '../../simulator/broker-account';
import { TERMINALS } from '../faults/site-under-test';
import { LOAD, lineKey } from './shape';

/** aedes in a process of its own, as it stands in the site: `broker-process.ts <port>`. */
const accounts: BrokerAccount[] = [
  { username: 'ingest', password: 'ingest-secret', kind: 'ingest' },
  ...Array.from({ length: LOAD.lines }, (_, index) => lineKey(index)).flatMap((line) =>
    TERMINALS.map((terminal): BrokerAccount => ({
      username: `${line}/${terminal}`,
      password: 'terminal-secret',
      kind: 'terminal',
    })),
  ),
];
await startBroker({ port: Number(process.argv[2]), accounts });
process.send!({ kind: 'ready' });
process.on('disconnect', () => process.exit(0));
