import type { BrokerAccount } from './broker-account';
import { type DemoMeasurements, SAMPLE_MS } from './demo-history';
import { isSilent, type Silence } from './network/silences';
import { hashed, seedOf } from './plant/noise';
import { createTerminal, type Terminal } from './terminal';

/** All terminals of the demo network, publishing. */
export type Terminals = {
  /** settles when the broker has accepted every one */
  readonly online: Promise<void>;
  close(): Promise<void>;
};

/** how long a terminal takes from its sample to its message */
const LATENCY_MS = { least: 25, most: 190 } as const;
/** an instant whose turn comes later than this, as after a machine slept, is left out */
const STALE_MS = 1_500;

/** Starts one client for each terminal's account, publishing at the instants that are multiples of 2 s. */
export function startTerminals(options: {
  readonly brokerUrl: string;
  readonly accounts: readonly BrokerAccount[];
  readonly measurements: DemoMeasurements;
  readonly silences: readonly Silence[];
  readonly now: () => number;
}): Terminals {
  const terminals = options.accounts
    .filter((account) => account.kind === 'terminal')
    .map((account) => terminalOf(account, options.brokerUrl));
  const byName = new Map(terminals.map((terminal) => [nameOf(terminal.line, terminal.key), terminal]));
  const lines = new Set(terminals.map((terminal) => terminal.line));
  const startedMs = options.now();
  const sample = (atMs: number): void => {
    for (const silence of options.silences) keepSilence(byName, silence, atMs - startedMs);
    for (const line of lines) publishLine(byName, line, options.measurements(line, atMs));
  };
  const clock = everySample(options.now, sample);
  return {
    online: Promise.all(terminals.map((terminal) => terminal.online)).then(() => undefined),
    close: async () => {
      clock.stop();
      await Promise.all(terminals.map((terminal) => terminal.close()));
    },
  };
}

const nameOf = (line: string, terminal: string): string => `${line}/${terminal}`;

function terminalOf(account: BrokerAccount, brokerUrl: string): Terminal {
  const [line = '', key = ''] = account.username.split('/');
  return createTerminal({ line, key, brokerUrl, password: account.password });
}

function keepSilence(byName: ReadonlyMap<string, Terminal>, silence: Silence, sinceStartMs: number): void {
  const terminal = byName.get(nameOf(silence.line, silence.terminal));
  if (isSilent(silence, sinceStartMs)) terminal?.drop();
  else terminal?.restore();
}

function publishLine(
  byName: ReadonlyMap<string, Terminal>,
  line: string,
  measurements: ReturnType<DemoMeasurements>,
): void {
  for (const { terminal: key, measurement } of measurements) {
    const terminal = byName.get(nameOf(line, key));
    setTimeout(() => terminal?.publish(measurement), latencyMs(nameOf(line, key)));
  }
}

const latencyMs = (name: string): number =>
  LATENCY_MS.least + (LATENCY_MS.most - LATENCY_MS.least) * hashed(seedOf(1, name), 0);

/** Calls at every multiple of the sample period, by the wall clock, without drifting from it. */
function everySample(now: () => number, sample: (atMs: number) => void): { stop(): void } {
  let timer: NodeJS.Timeout;
  let lastMs = 0;
  const arm = (): void => {
    // A timer may fire a moment early; the same instant must not come twice.
    const nextMs = (Math.floor(Math.max(now(), lastMs) / SAMPLE_MS) + 1) * SAMPLE_MS;
    timer = setTimeout(() => {
      lastMs = nextMs;
      if (now() - nextMs < STALE_MS) sample(nextMs);
      arm();
    }, nextMs - now());
  };
  arm();
  return { stop: () => clearTimeout(timer) };
}
