import type { LineSummary } from '../contract/lines';
import type { Terminal } from '../contract/register';
import type { TerminalResult } from '../contract/result';
import { ampsText, durationText, instantText } from './figures';
import { DASH, degreesText } from './line-figures';
import { terminalName } from './line-words';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import type { PhaseLetters } from './site-custom';

/** What one terminal says now, in words and figures. */
export interface TerminalPanel {
  readonly key: string;
  readonly name: string;
  readonly transformer: string;
  /** what is not as it should be, in words; undefined while all is */
  readonly trouble: string | undefined;
  readonly facts: readonly { readonly name: string; readonly value: string; readonly bad: boolean }[];
  readonly phasors: readonly PhasorRow[];
  readonly voltageShown: boolean;
}

export interface PhasorRow {
  readonly phase: PhaseName;
  readonly letter: string;
  readonly current: string;
  readonly currentAngle: string;
  readonly voltage: string;
  readonly voltageAngle: string;
}

interface TerminalContext {
  readonly goesBy: LineSummary['goesBy'];
  readonly letters: PhaseLetters;
  readonly substations: LineSummary['substations'];
  /** since when each silent terminal has been so, by key, in words */
  readonly silentSince: ReadonlyMap<string, string>;
}

/** On a line by reported magnitudes one terminal speaks for all: the others' silence is no trouble. */
type TroubleContext = TerminalContext & { readonly unexpected: boolean };

/** The terminals of the register in their order, each with what it said at the newest instant. */
export function terminalPanels(
  terminals: readonly Terminal[],
  results: readonly TerminalResult[],
  context: TerminalContext,
): TerminalPanel[] {
  const byKey = new Map(results.map((result) => [result.key, result]));
  const unexpected = context.goesBy === 'reported' && results.some((result) => result.present);
  return [...terminals]
    .sort((one, other) => one.position - other.position)
    .map((terminal) => terminalPanel(terminal, byKey.get(terminal.key), { ...context, unexpected }));
}

function terminalPanel(
  terminal: Terminal,
  result: TerminalResult | undefined,
  context: TroubleContext,
): TerminalPanel {
  return {
    key: terminal.key,
    name: terminal.substationName || terminalName(terminal.key, context.substations),
    transformer: `${Math.round(terminal.ctPrimaryAmps)} A${terminal.ctClass === '' ? '' : `, ${terminal.ctClass}`}`,
    trouble: trouble(terminal, result, context),
    facts: result === undefined || !result.present ? [] : facts(result),
    phasors: PHASES.map((phase) => phasorRow(result, phase, context.letters)),
    voltageShown: result?.voltage !== null && result?.voltage !== undefined,
  };
}

function trouble(
  terminal: Terminal,
  result: TerminalResult | undefined,
  { silentSince, unexpected }: TroubleContext,
): string | undefined {
  if (!terminal.inService) return 'Out of service in the register.';
  if (result?.present === true) return undefined;
  if (unexpected) return 'Nothing is expected of it: this line goes by what another terminal reports.';
  if (result === undefined) return 'Nothing has been heard of it yet.';
  const since = silentSince.get(terminal.key);
  return since === undefined ? 'Silent at the newest instant.' : `Silent since ${since}.`;
}

const CLOCKS = { satellite: 'satellite', channel: 'by the channel', free: 'free-running' } as const;

function facts({
  validity,
  breaker,
  clock,
  channel,
  frequencyHz,
  test,
}: TerminalResult): TerminalPanel['facts'] {
  const found = [
    { name: 'values', value: validity ?? DASH, bad: validity !== 'good' },
    { name: 'breaker', value: breaker ?? DASH, bad: breaker === 'open' },
    {
      name: 'clock',
      value: clock === null ? DASH : `${CLOCKS[clock.source]}, ± ${clock.error_us} µs`,
      bad: clock?.source === 'free',
    },
  ];
  if (channel !== null) {
    const { send_ms, receive_ms, path, loss_ppm } = channel;
    const asymmetryMs = Math.abs(send_ms - receive_ms);
    found.push({ name: 'channel', value: `${path}, loss ${loss_ppm} ppm`, bad: false });
    const delay = `${send_ms.toFixed(2)} ms out, ${receive_ms.toFixed(2)} ms back`;
    found.push({ name: 'delay', value: delay, bad: false });
    found.push({ name: 'asymmetry', value: `${asymmetryMs.toFixed(2)} ms`, bad: false });
  }
  if (frequencyHz !== null)
    found.push({ name: 'frequency', value: `${frequencyHz.toFixed(3)} Hz`, bad: false });
  if (test) found.push({ name: 'test', value: 'flagged as a test', bad: true });
  return found;
}

function phasorRow(result: TerminalResult | undefined, phase: PhaseName, letters: PhaseLetters): PhasorRow {
  const current = result?.current?.[phase];
  const voltage = result?.voltage?.[phase];
  return {
    phase,
    letter: letters[phase],
    current: current === undefined ? DASH : ampsText(current[0]),
    currentAngle: degreesText(current?.[1]),
    voltage: voltage === undefined ? DASH : `${voltage[0].toFixed(1)}\u00a0kV`,
    voltageAngle: degreesText(voltage?.[1]),
  };
}

/** Since when each silent terminal has been so, from the open warnings that name it. */
export function silences(
  warnings: LineSummary['warnings'],
  { nowMs, timeZone }: { nowMs: number; timeZone: string },
): ReadonlyMap<string, string> {
  const found = new Map<string, string>();
  for (const { cause, openedAt, returnedAt } of warnings) {
    if (returnedAt !== null || cause.basis !== 'terminal silent') continue;
    const since = `${instantText(openedAt, nowMs, timeZone)}, for ${durationText(nowMs - Date.parse(openedAt))}`;
    for (const key of cause.terminals) found.set(key, since);
  }
  return found;
}
