import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { LineList, LineSummary } from '../../src/contract/lines';
import { madeUpLine, PERIOD_MS } from '../faults/site-under-test';
import { type Mosquitto, startMosquitto } from '../mosquitto';
import { type Caller, type RunningSite, signedIn, startSite } from '../running-site';
import { until } from '../until';

const run = promisify(execFile);
const LINE = 'quern-rill';

let mosquitto: Mosquitto;
let site: RunningSite;
let engineer: Caller;

beforeAll(async () => {
  mosquitto = await startMosquitto();
  site = await startSite(mosquitto.url);
  engineer = await signedIn(site.address, 'engineer');
});
afterAll(async () => {
  await site.close();
  await mosquitto.close();
});

const publish = (terminal: string, measurement: unknown) =>
  run('mosquitto_pub', [
    '-h',
    '127.0.0.1',
    '-p',
    String(mosquitto.port),
    '-q',
    '1',
    '-t',
    `feed/${LINE}/${terminal}/measurement`,
    '-m',
    JSON.stringify(measurement),
  ]);

const summary = async (): Promise<LineSummary | undefined> => {
  const { lines } = (await (await engineer.get('/api/lines')).json()) as LineList;
  return lines.find(({ key }) => key === LINE);
};

/** 3-4-5 triangles, so that every magnitude is known by hand. */
const measurement = (at: string, current: Record<'a' | 'b' | 'c', [number, number]>) => ({
  at,
  seq: 1,
  current,
  frequency: 50,
  breaker: 'closed',
  clock: { source: 'satellite', error_us: 2 },
  validity: 'good',
  test: false,
  unheard_of: 'ignored',
});

it(
  'a line added by script and fed by Debian’s own clients gives back its exact figures',
  { timeout: 60_000 },
  async () => {
    expect((await engineer.send('POST', '/api/register/lines', madeUpLine(LINE))).status).toBe(201);
    const at = new Date(Math.floor(Date.now() / PERIOD_MS) * PERIOD_MS).toISOString();
    const first = { a: [400, 0], b: [400, 0], c: [300, 0] } as Record<'a' | 'b' | 'c', [number, number]>;
    const second = { a: [360, 180], b: [200, 180], c: [400, 90] } as Record<
      'a' | 'b' | 'c',
      [number, number]
    >;
    // the worker looks for new lines every second; what it does not know yet it refuses, so it is fed until it does
    const line = await until(
      async () => {
        await publish('anvil', measurement(at, first));
        await publish('birch', measurement(at, second));
        const found = await summary();
        return found?.at === at ? found : undefined;
      },
      30_000,
      () => `result of the made-up line: ${site.output()}`,
    );

    // pickup 100 A, slope 30 % of half the sum of magnitudes
    expect(line.phases.a).toEqual({
      differentialAmps: expect.closeTo(40, 9) as number,
      restraintAmps: expect.closeTo(380, 9) as number,
      thresholdAmps: expect.closeTo(114, 9) as number,
      utilisation: expect.closeTo(40 / 114, 12) as number,
    });
    expect(line.phases.b).toEqual({
      differentialAmps: expect.closeTo(200, 9) as number,
      restraintAmps: expect.closeTo(300, 9) as number,
      thresholdAmps: expect.closeTo(100, 9) as number,
      utilisation: expect.closeTo(2, 12) as number,
    });
    expect(line.phases.c).toEqual({
      differentialAmps: expect.closeTo(500, 9) as number,
      restraintAmps: expect.closeTo(350, 9) as number,
      thresholdAmps: expect.closeTo(105, 9) as number,
      utilisation: expect.closeTo(500 / 105, 12) as number,
    });
    expect(line.condition).toBe('over');
  },
);

it('the raw rows give back the terminals’ phasors as they were sent', async () => {
  const from = new Date(Date.now() - 600_000).toISOString();
  const to = new Date(Date.now() + 60_000).toISOString();
  const answer = await engineer.get(`/api/lines/${LINE}/snapshots?from=${from}&to=${to}`);
  const { snapshots } = (await answer.json()) as { snapshots: { terminals: unknown[] }[] };
  expect(snapshots).toHaveLength(1);
  expect(snapshots[0]!.terminals).toMatchObject([
    { key: 'anvil', current: { a: [400, 0], b: [400, 0], c: [300, 0] } },
    { key: 'birch', current: { a: [360, 180], b: [200, 180], c: [400, 90] } },
  ]);
});
