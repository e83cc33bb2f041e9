import { measurementTopic, type Measurement, type PolarPerPhase } from '../src/contract/feed';
import { demoLines, demoTruths } from './network/demo-lines';
import { add, angleRad, type Complex, magnitude, type Three } from './plant/complex';
import { isInGap } from './plant/gap';
import { hashed, seedOf } from './plant/noise';
import { createPlant, type LineState, type TerminalState } from './plant/plant';
import type { LineTruth, TerminalTruth } from './plant/truth';
import { storyLines, storyTruths } from './stories/story-lines';

/** What one terminal publishes for an instant. */
export type DemoMeasurement = {
  readonly terminal: string;
  readonly topic: string;
  readonly measurement: Measurement;
};

/** All that a line's terminals publish for an instant, in the terminals' order; those that go missing are left out. */
export type DemoMeasurements = (line: string, atMs: number) => DemoMeasurement[];

export const SAMPLE_MS = 2_000;

type Sender = {
  readonly truth: TerminalTruth;
  readonly topic: string;
  readonly position: number;
  readonly seed: number;
};
type SendingLine = {
  readonly truth: LineTruth;
  readonly goesBy: 'phasors' | 'reported';
  readonly restrainedBy: 'half sum' | 'greatest';
  readonly senders: readonly Sender[];
};

/**
 * The feed of the demo network and of the story lines as a pure function of seed, epoch, line and instant. It throws
 * for a line that neither has. Instants are multiples of 2 s, though any whole millisecond is answered.
 */
export function createDemoMeasurements(site: {
  readonly seed: number;
  readonly epochMs: number;
}): DemoMeasurements {
  const plant = createPlant(TRUTHS, site);
  const lines = new Map(LINES.map((line, index) => [line.key, sendingLine(line, TRUTHS[index]!, site.seed)]));
  return (key, atMs) => {
    const line = lines.get(key);
    if (line === undefined) throw new RangeError(`The demo network has no line ${key}.`);
    const state = plant.state(key, atMs);
    const sample = { at: new Date(atMs).toISOString(), seq: Math.floor(atMs / SAMPLE_MS) - SEQ_ORIGIN };
    return line.senders
      .filter((sender) => !goesMissing(sender, { seq: sample.seq, sinceEpochMs: atMs - site.epochMs }))
      .map((sender) => ({
        terminal: sender.truth.key,
        topic: sender.topic,
        measurement: measurementOf(line, { state, terminal: state.terminals[sender.position]! }, sample),
      }));
  };
}

/** 2024-01-01T00:00:00Z in samples: counting from there keeps numbers short and needs no memory between starts. */
const SEQ_ORIGIN = Date.UTC(2024, 0, 1) / SAMPLE_MS;

const LINES = [...demoLines, ...storyLines];
const TRUTHS = [...demoTruths, ...storyTruths];

function sendingLine(line: (typeof LINES)[number], truth: LineTruth, seed: number): SendingLine {
  const publishing = line.goesBy === 'reported' ? truth.terminals.slice(0, 1) : truth.terminals;
  return {
    truth,
    goesBy: line.goesBy,
    restrainedBy: line.settings.at(-1)?.restraint.kind === 'maximum' ? 'greatest' : 'half sum',
    senders: publishing.map((terminal, position) => ({
      truth: terminal,
      topic: measurementTopic(line.key, terminal.key),
      position,
      seed: seedOf(seed, `${line.key}/${terminal.key} missing`),
    })),
  };
}

function goesMissing(
  { truth, seed }: Sender,
  { seq, sinceEpochMs }: { readonly seq: number; readonly sinceEpochMs: number },
): boolean {
  if (truth.gaps !== undefined && isInGap(truth.gaps, sinceEpochMs)) return true;
  return truth.missingShare > 0 && hashed(seed, seq) < truth.missingShare;
}

function measurementOf(
  line: SendingLine,
  { state, terminal }: { readonly state: LineState; readonly terminal: TerminalState },
  sample: { readonly at: string; readonly seq: number },
): Measurement {
  const { clock, channel } = terminal;
  const measurement: Measurement = {
    at: sample.at,
    seq: sample.seq,
    frequency: rounded(state.frequencyHz, 1000),
    breaker: state.breakers,
    clock: { source: clock.source, error_us: Math.round(clock.errorUs) },
    channel: {
      send_ms: rounded(channel.sendMs, 1000),
      receive_ms: rounded(channel.receiveMs, 1000),
      loss_ppm: Math.round(channel.lossPpm),
      path: channel.path,
    },
    // Free-running time makes a phasor doubtful, and a terminal knows it.
    validity: clock.source === 'free' ? 'questionable' : 'good',
    test: false,
  };
  if (line.goesBy === 'phasors') measurement.current = polarPerPhase(terminal.amps, { unit: 1, steps: 100 });
  if (line.truth.hasVoltage) measurement.voltage = polarPerPhase(terminal.volts, { unit: 1000, steps: 1000 });
  if (line.goesBy === 'reported' || line.truth.reportsToo) measurement.reported = reportedOf(line, state);
  return measurement;
}

/** What a terminal works out from all terminals' currents by itself, amperes primary. */
function reportedOf(line: SendingLine, state: LineState): NonNullable<Measurement['reported']> {
  const ofPhase = (phase: 0 | 1 | 2): { differential: number; restraint: number } => {
    const amps = state.terminals.map((terminal) => terminal.amps[phase]);
    const magnitudes = amps.map(magnitude);
    return {
      differential: rounded(magnitude(amps.reduce(add)), 100),
      restraint: rounded(
        line.restrainedBy === 'greatest'
          ? Math.max(...magnitudes)
          : magnitudes.reduce((sum, each) => sum + each, 0) / 2,
        100,
      ),
    };
  };
  const [a, b, c] = [ofPhase(0), ofPhase(1), ofPhase(2)];
  return {
    differential: [a.differential, b.differential, c.differential],
    restraint: [a.restraint, b.restraint, c.restraint],
  };
}

type Fineness = { readonly unit: number; readonly steps: number };

const polarPerPhase = ([a, b, c]: Three<Complex>, fineness: Fineness): PolarPerPhase => ({
  a: polarOnWire(a, fineness),
  b: polarOnWire(b, fineness),
  c: polarOnWire(c, fineness),
});

const polarOnWire = (phasor: Complex, { unit, steps }: Fineness): [number, number] => [
  rounded(magnitude(phasor) / unit, steps),
  rounded((angleRad(phasor) * 180) / Math.PI, 1000),
];

const rounded = (value: number, steps: number): number => Math.round(value * steps) / steps;
