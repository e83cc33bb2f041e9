import { startBroker } from './broker';
import { runSiteProcess } from './site-process';

await runSiteProcess(async (site) => {
  const broker = await startBroker({ port: site.ports.broker, accounts: site.accounts });
  return { ready: { port: broker.port }, close: broker.close };
});
