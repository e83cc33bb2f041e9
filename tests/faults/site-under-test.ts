import { type ChildProcess, spawn } from 'node:child_process';
import { connectAsync, type MqttClient } from 'mqtt';
import { measurementTopic, type Measurement } from '../../src/contract/feed';
import type { NewLine } from '../../src/contract/register';
import type { BrokerAccount } from '../../simulator/broker-account';
import type { Store } from '../../src/store/client';
import { insertLine } from '../../src/store/register-edit';

/** A made-up line, its two terminals, and the worker as a process of its own that can be killed. */

export const LINE = 'anvil-birch';
export const TERMINALS = ['anvil', 'birch'] as const;
export const PERIOD_MS = 2_000;

export const ACCOUNTS: readonly BrokerAccount[] = [
  { username: 'ingest', password: 'ingest-secret', kind: 'ingest' },
  { username: 'web', password: 'web-secret', kind: 'web' },
  ...TERMINALS.map((terminal): BrokerAccount => ({
    username: `${LINE}/${terminal}`,
    password: 'terminal-secret',
    kind: 'terminal',
  })),
];

const SETTINGS_FROM = '2020-01-01T00:00:00Z';

export const madeUpLine = (key: string): NewLine => ({
  key,
  name: 'Anvil – Birch',
  owner: null,
  voltageKv: 110,
  ratingAmps: 600,
  emergencyRatingAmps: 700,
  lengthKm: 20,
  kind: 'overhead',
  capacitanceNfPerKm: 9.5,
  leastInternalFaultAmps: null,
  goesBy: 'phasors',
  inService: true,
  seriesCompensated: false,
  inZoneTransformer: null,
  terminals: TERMINALS.map((terminal) => ({
    key: terminal,
    substation: terminal,
    substationName: terminal[0]!.toUpperCase() + terminal.slice(1),
    ctPrimaryAmps: 600,
    ctClass: '5P20',
    inService: true,
  })),
  settings: [
    {
      validFrom: SETTINGS_FROM,
      characteristic: {
        kind: 'two-slope',
        pickupAmps: 100,
        slope1: 0.3,
        kneeAmps: 800,
        slope2: 0.7,
        slopeStart: 'from-zero',
      },
      restraint: { kind: 'scaled-sum', factor: 0.5 },
      chargingCompensation: false,
      note: 'As found.',
    },
  ],
});

export async function insertMadeUpLine(store: Store, key = LINE): Promise<void> {
  const edit = await insertLine(store, madeUpLine(key), {
    by: { id: 'test', name: 'Test' },
    nowMs: Date.now(),
  });
  if (!edit.ok) throw new Error(JSON.stringify(edit.problem));
}

/**
 * What one terminal sends for an instant: `amps` flow in at the first and all but `differentialAmps` of them out at
 * the second, in phase opposition.
 */
export function madeUpMeasurement(
  terminal: (typeof TERMINALS)[number],
  { atMs, amps, differentialAmps }: { atMs: number; amps: number; differentialAmps: number },
): Measurement {
  const [magnitude, turn] = terminal === 'anvil' ? [amps, 0] : [amps - differentialAmps, 180];
  return {
    at: new Date(atMs).toISOString(),
    seq: atMs / PERIOD_MS,
    current: { a: [magnitude, turn], b: [magnitude, turn - 120], c: [magnitude, turn + 120] },
    frequency: 50,
    breaker: 'closed',
    clock: { source: 'satellite', error_us: 1 },
    validity: 'good',
    test: false,
  };
}

type Terminals = Readonly<Record<(typeof TERMINALS)[number], MqttClient>>;

/** The made-up line's terminals, each a client of its own with its own credentials. */
export async function connectTerminals(
  url: string,
  line = LINE,
): Promise<Terminals & { close(): Promise<void> }> {
  const connected = (terminal: string) =>
    connectAsync(url, {
      protocolVersion: 4,
      reconnectPeriod: 200,
      username: `${line}/${terminal}`,
      password: 'terminal-secret',
    });
  const [anvil, birch] = await Promise.all(TERMINALS.map(connected));
  return {
    anvil: anvil!,
    birch: birch!,
    close: async () => {
      await Promise.all([anvil!.endAsync(), birch!.endAsync()]);
    },
  };
}

/** Publishes every instant's two measurements at QoS 1; settles when the broker has taken them all. */
export async function publishInstants(
  terminals: Terminals,
  instants: readonly number[],
  {
    line = LINE,
    amps = 400,
    differentialAmps = 10,
  }: { line?: string; amps?: number; differentialAmps?: number } = {},
): Promise<void> {
  const AT_ONCE = 200;
  for (let from = 0; from < instants.length; from += AT_ONCE)
    await Promise.all(
      instants
        .slice(from, from + AT_ONCE)
        .flatMap((atMs) =>
          TERMINALS.map((terminal) =>
            terminals[terminal].publishAsync(
              measurementTopic(line, terminal),
              JSON.stringify(madeUpMeasurement(terminal, { atMs, amps, differentialAmps })),
              { qos: 1 },
            ),
          ),
        ),
    );
}

export interface WorkerProcess {
  readonly child: ChildProcess;
  output(): string;
  /** ends it at once, as a power cut would */
  kill(): Promise<void>;
  stop(): Promise<void>;
}

export function spawnWorker(
  environment: { DATABASE_URL: string; BROKER_URL: string } & Record<string, string>,
): WorkerProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'src/ingest/main.ts'], {
    env: { PATH: process.env['PATH'], ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  child.stdout.on('data', (chunk: Buffer) => (output += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (output += chunk.toString()));
  const exited = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  const end = async (signal: NodeJS.Signals) => {
    child.kill(signal);
    await exited;
  };
  return { child, output: () => output, kill: () => end('SIGKILL'), stop: () => end('SIGTERM') };
}

/** Instants of the feed's period, in order, the last one just before `endMs`. */
export function instantsBefore(endMs: number, count: number): number[] {
  const last = Math.floor(endMs / PERIOD_MS) * PERIOD_MS;
  return Array.from({ length: count }, (_, index) => last - (count - index) * PERIOD_MS);
}
