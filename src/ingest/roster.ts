import { expectedTerminals } from '../contract/expected-terminals';
import { type Conditions, type Scheme, schemeAtTerminals } from '../protection/scheme';
import type { Zone } from '../protection/zone';
import type { RegisteredLine } from '../store/register';
import { lineZone } from '../view/line-zone';
import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { obstacle } from '../warnings/obstacle';
import { ownerOf } from './ownership';

export interface RosterTerminal {
  readonly id: number;
  readonly key: string;
  readonly substationName: string;
}

export interface SchemeVersion {
  readonly id: number;
  readonly fromMs: number;
  /** its figures in the order of the expected terminals */
  readonly scheme: Scheme;
  /** undefined where nothing lies in the zone that has to be taken out */
  readonly zone: Zone | undefined;
  readonly conditions: Conditions;
}

/** A line as the worker needs it on every measurement. */
export interface RosterLine {
  readonly id: number;
  readonly key: string;
  readonly ratingAmps: number;
  /** the entry that this was made of, for what is looked at seldom */
  readonly register: RegisterLine;
  readonly goesBy: 'phasors' | 'reported';
  readonly inService: boolean;
  /** why this line can't be evaluated whatever arrives; undefined when it can */
  readonly obstacle: string | undefined;
  readonly terminals: ReadonlyMap<string, RosterTerminal>;
  /** terminals whose measurements make a snapshot complete */
  readonly expected: readonly string[];
  /** oldest first */
  readonly versions: readonly SchemeVersion[];
}

export type Roster = ReadonlyMap<string, RosterLine>;

/** The lines that are this worker's, ready for the hot path. */
export function roster(
  register: readonly RegisteredLine[],
  {
    workerIndex,
    workerCount,
    frequencyHz,
  }: { workerIndex: number; workerCount: number; frequencyHz: number },
): Roster {
  const own = register.filter(({ key }) => ownerOf(key, workerCount) === workerIndex);
  return new Map(own.map((line) => [line.key, rosterLine(line, frequencyHz)]));
}

/** `frequencyHz` is the system's nominal one, by which line constants and time errors are turned into currents. */
export function rosterLine(line: RegisteredLine, frequencyHz: number): RosterLine {
  const expected = expectedTerminals(line);
  return {
    id: line.id,
    key: line.key,
    ratingAmps: line.ratingAmps,
    register: line,
    goesBy: line.goesBy,
    inService: line.inService,
    obstacle: obstacle(line),
    terminals: new Map(
      line.terminals.map(({ key, substationName }) => [
        key,
        { id: line.terminalIds.get(key)!, key, substationName },
      ]),
    ),
    expected,
    versions: line.settings.map((version) => schemeVersion(version, { line, expected, frequencyHz })),
  };
}

/** A version of a line's settings, ready to be evaluated. */
export function schemeVersion(
  version: Pick<
    SettingsVersion,
    'id' | 'validFrom' | 'characteristic' | 'restraint' | 'chargingCompensation'
  >,
  { line, expected, frequencyHz }: { line: RegisterLine; expected: readonly string[]; frequencyHz: number },
): SchemeVersion {
  const { id, validFrom, characteristic, restraint, chargingCompensation } = version;
  return {
    id,
    fromMs: Date.parse(validFrom),
    scheme: schemeAtTerminals({ characteristic, restraint }, expected),
    zone: lineZone(line, { expected, chargingCompensation, frequencyHz }),
    conditions: { frequencyHz },
  };
}

/** The settings version in force at an instant, or undefined before the first. */
export function versionInForce(line: RosterLine, atMs: number): SchemeVersion | undefined {
  return line.versions.findLast((version) => version.fromMs <= atMs);
}
