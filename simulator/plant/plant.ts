import { type Busbar, busbarOf, busbarVolts, networkHz } from './busbar';
import { channelAngleRad, type ChannelState, channelState } from './channel';
import { type ClockState, clockState } from './clock';
import { type Complex, complex, eachPhase, multiply, polar, scale, type Three } from './complex';
import { measuredAmps, measuredVolts } from './instrument';
import { type PiSection, teeFlow, type TerminalFlow, twoTerminalFlow } from './line-flow';
import { loadShare, loadUnbalance } from './load';
import { seedOf } from './noise';
import { ramped } from './ramp';
import { farSide } from './transformer';
import type { CtError, LineTruth, TerminalTruth } from './truth';

/** One terminal of a line at an instant: what truly flows there, and what the terminal makes of it. */
export type TerminalState = {
  readonly key: string;
  readonly trueFlow: Three<TerminalFlow>;
  /** amperes rms into the line, with transformer, time and noise errors */
  readonly amps: Three<Complex>;
  /** volts rms to earth */
  readonly volts: Three<Complex>;
  readonly clock: ClockState;
  readonly channel: ChannelState;
};

export type LineState = {
  readonly frequencyHz: number;
  readonly breakers: 'closed' | 'open';
  readonly terminals: readonly TerminalState[];
};

/** The invented network as physics: a pure function of seed, epoch, line and instant. */
export type Plant = { state(line: string, atMs: number): LineState };

type CompiledLine = {
  readonly truth: LineTruth;
  readonly busbar: Busbar;
  readonly loadSeed: number;
  readonly channelSeed: number;
  readonly terminalSeeds: readonly number[];
};
type Site = { readonly seed: number; readonly epochMs: number };

const SAMPLE_MS = 2_000;
const DAY_MS = 86_400_000;

/** `epochMs` is when the demo site first came up: the stories are told around it. */
export function createPlant(truths: readonly LineTruth[], { seed, epochMs }: Site): Plant {
  const frequencySeed = seedOf(seed, 'frequency');
  const lines = new Map(truths.map((truth) => [truth.key, compiled(truth, seed)]));
  return {
    state(key, atMs) {
      const line = lines.get(key);
      if (line === undefined) throw new RangeError(`The plant has no line ${key}.`);
      const frequencyHz = networkHz(frequencySeed, atMs);
      const flows = trueFlows(line, frequencyHz, { atMs, epochMs });
      const seen = channelState(line.truth.channel, line.channelSeed, { atMs, epochMs });
      const terminals = line.truth.terminals.map((terminal, position) =>
        terminalState(
          {
            terminal,
            position,
            line,
            flow: flows[position]!,
            channel: position === 0 ? swapped(seen) : seen,
          },
          frequencyHz,
          { atMs, epochMs },
        ),
      );
      return { frequencyHz, breakers: line.truth.breakers, terminals };
    },
  };
}

function compiled(truth: LineTruth, seed: number): CompiledLine {
  return {
    truth,
    busbar: busbarOf(seed, truth),
    loadSeed: seedOf(seed, `${truth.key} load`),
    channelSeed: seedOf(seed, `${truth.key} channel`),
    terminalSeeds: truth.terminals.map((terminal) => seedOf(seed, `${truth.key}/${terminal.key}`)),
  };
}

/** Flows by terminal, then by phase. */
function trueFlows(
  line: CompiledLine,
  frequencyHz: number,
  at: { readonly atMs: number; readonly epochMs: number },
): readonly Three<TerminalFlow>[] {
  const { truth } = line;
  if (truth.breakers === 'open') return truth.terminals.map(() => eachPhase(() => DEAD));
  const volts = busbarVolts(line.busbar, at.atMs);
  const towards = truth.load.from === 'first' ? 1 : -1;
  const throughAmps = towards * truth.ratingAmps * loadShare(truth.load, line.loadSeed, at);
  const lag = polar(throughAmps / line.busbar.phaseVolts, -Math.atan(truth.load.tanPhi));
  const unbalance = loadUnbalance(line.loadSeed, at.atMs);
  const byPhase = eachPhase((phase) =>
    phaseFlow(truth, sectionsOf(truth, frequencyHz, { phase, sinceEpochMs: at.atMs - at.epochMs }), {
      volts: volts[phase],
      throughAmps: multiply(volts[phase], scale(lag, unbalance[phase])),
    }),
  );
  const byTerminal = truth.terminals.map((_, position) => eachPhase((phase) => byPhase[phase][position]!));
  return truth.transformer === undefined
    ? byTerminal
    : [byTerminal[0]!, farSide(byTerminal[1]!, truth.transformer)];
}

const DEAD: TerminalFlow = { amps: complex(0, 0), volts: complex(0, 0) };

function sectionsOf(
  { branches, capacitanceDrift }: LineTruth,
  frequencyHz: number,
  { phase, sinceEpochMs }: { readonly phase: 0 | 1 | 2; readonly sinceEpochMs: number },
): readonly PiSection[] {
  const grown = capacitanceDrift?.phase === phase ? 1 + ramped(capacitanceDrift, sinceEpochMs) : 1;
  return branches.map((branch) => ({
    impedanceOhm: complex(branch.resistanceOhm, (branch.reactanceOhm * frequencyHz) / 50),
    susceptanceS: 2 * Math.PI * frequencyHz * branch.capacitanceNf * grown * 1e-9,
  }));
}

function phaseFlow(
  truth: LineTruth,
  sections: readonly PiSection[],
  first: { readonly volts: Complex; readonly throughAmps: Complex },
): readonly TerminalFlow[] {
  const [one, two, three] = sections;
  return two === undefined || three === undefined
    ? twoTerminalFlow(one!, first.volts, first.throughAmps)
    : teeFlow([one!, two, three], first, truth.secondShare);
}

const swapped = (channel: ChannelState): ChannelState => ({
  ...channel,
  sendMs: channel.receiveMs,
  receiveMs: channel.sendMs,
});

type Standpoint = {
  readonly terminal: TerminalTruth;
  readonly position: number;
  readonly line: CompiledLine;
  readonly flow: Three<TerminalFlow>;
  readonly channel: ChannelState;
};

function terminalState(
  { terminal, position, line, flow, channel }: Standpoint,
  frequencyHz: number,
  { atMs, epochMs }: { readonly atMs: number; readonly epochMs: number },
): TerminalState {
  const seed = line.terminalSeeds[position]!;
  const clock = clockState(
    { timeFrom: terminal.timeFrom, loss: terminal.clockLoss, drift: terminal.clockDrift, seed },
    { atMs, epochMs },
  );
  // The first terminal is the others' time reference.
  const followsChannel = clock.source === 'channel' && position > 0;
  const timeAngleRad =
    (followsChannel ? channelAngleRad(channel, frequencyHz) : 0) +
    2 * Math.PI * frequencyHz * clock.trueOffsetUs * 1e-6;
  const index = Math.floor(atMs / SAMPLE_MS);
  const noise = eachPhase((phase) => ({ timeAngleRad, seed: seed + phase, index }));
  const sinceEpochMs = atMs - epochMs;
  return {
    key: terminal.key,
    trueFlow: flow,
    amps: eachPhase((phase) =>
      measuredAmps(flow[phase].amps, ctErrorAt(line.truth, terminal, { phase, sinceEpochMs }), noise[phase]),
    ),
    volts: eachPhase((phase) => measuredVolts(flow[phase].volts, noise[phase])),
    clock,
    channel,
  };
}

function ctErrorAt(
  { ratioDrift }: LineTruth,
  terminal: TerminalTruth,
  { phase, sinceEpochMs }: { readonly phase: 0 | 1 | 2; readonly sinceEpochMs: number },
): CtError {
  const replaced = terminal.replaced?.phase === phase ? terminal.replaced : undefined;
  const isReplaced = replaced !== undefined && sinceEpochMs >= replaced.atDay * DAY_MS;
  const error = isReplaced ? replaced.error : terminal.ctErrors[phase];
  if (ratioDrift === undefined || ratioDrift.terminal !== terminal.key || ratioDrift.phase !== phase)
    return error;
  return { ...error, ratio: error.ratio + ramped(ratioDrift, sinceEpochMs) };
}
