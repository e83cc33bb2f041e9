import type { Measurement } from '../../src/contract/feed';
import { inZoneTransformerSchema, newSettingsVersionSchema } from '../../src/contract/register';
import { roster, type RosterLine } from '../../src/ingest/roster';
import type { RegisteredLine } from '../../src/store/register';
import { newLine, settingsSent, terminalSent } from '../register/made-up-line';

/** Ten o'clock, UTC, on a spring morning: the instant about which the made-up feed turns. */
export const AT_MS = Date.parse('2026-03-02T10:00:00.000Z');
export const iso = (atMs: number): string => new Date(atMs).toISOString();

/** The same current in the three phases, `degrees` for phase a. */
export const balanced = (amps: number, degrees: number): NonNullable<Measurement['current']> => ({
  a: [amps, degrees],
  b: [amps, degrees - 120],
  c: [amps, degrees + 120],
});

/** A measurement as the contract holds it: good, loaded with 400 A, and phasors alone. */
export function measurement(change: Partial<Measurement> = {}): Measurement {
  return {
    at: iso(AT_MS),
    seq: 1,
    current: balanced(400, 0),
    frequency: 50,
    breaker: 'closed',
    clock: { source: 'satellite', error_us: 2 },
    validity: 'good',
    test: false,
    ...change,
  };
}

/** What a terminal of a line that goes by reported magnitudes sends. */
export function reportedMeasurement(change: Partial<Measurement> = {}): Measurement {
  const { current: _current, ...rest } = measurement({
    reported: { differential: [9, 8, 12], restraint: [400, 410, 390] },
    ...change,
  });
  return rest;
}

export const payloadOf = (sent: unknown): Buffer => Buffer.from(JSON.stringify(sent));

const TERMINAL_IDS = new Map([
  ['arden', 11],
  ['birk', 12],
  ['corl', 13],
]);

/** The made-up line of the register: 220 kV, rated 1000 A, pickup 120 A, slope 30 % to a knee at 1500 A. */
export function registeredLine(
  change: Partial<RegisteredLine> = {},
  terminalKeys: readonly string[] = ['arden', 'birk'],
): RegisteredLine {
  // by way of the contract, so that what a line need not say is filled in as the register fills it in
  const { terminals, ...line } = newLine({ terminals: terminalKeys.map(terminalSent) });
  return {
    id: 7,
    ...line,
    terminals: terminals.map((terminal, position) => ({
      ...terminal,
      position,
      substationName: terminal.key[0]!.toUpperCase() + terminal.key.slice(1),
    })),
    terminalIds: TERMINAL_IDS,
    settings: [settingsVersion(1, '2026-01-01T00:00:00.000Z', 120)],
    ...change,
  };
}

export function settingsVersion(
  id: number,
  validFrom: string,
  pickupAmps: number,
): RegisteredLine['settings'][number] {
  const characteristic = { ...(settingsSent().characteristic as object), pickupAmps };
  const version = newSettingsVersionSchema.parse(settingsSent({ validFrom, characteristic }));
  return { id, ...version, recordedBy: 'Mira Holt', recordedAt: validFrom };
}

/** A line with a transformer of 220/110 kV in its zone. */
export const withTransformer = (): Partial<RegisteredLine> => ({
  inZoneTransformer: inZoneTransformerSchema.parse({ otherVoltageKv: 110, clockNumber: 5 }),
});

/** A line as the worker holds it. */
export const rosterLine = (line: RegisteredLine = registeredLine()): RosterLine =>
  roster([line], { workerIndex: 0, workerCount: 1, frequencyHz: 50 }).get(line.key)!;
