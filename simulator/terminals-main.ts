import { createDemoMeasurements } from './demo-history';
import { demoSilences } from './network/silences';
import { runSiteProcess } from './site-process';
import { startTerminals } from './terminals';

await runSiteProcess(async (site) => {
  const terminals = startTerminals({
    brokerUrl: `mqtt://127.0.0.1:${site.ports.broker}`,
    accounts: site.accounts,
    measurements: createDemoMeasurements(site),
    silences: demoSilences,
    now: Date.now,
  });
  await terminals.online;
  return { ready: {}, close: terminals.close };
});
