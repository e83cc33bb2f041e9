import type { Scheme } from '../protection/evaluation';
import type { RegisteredLine } from '../store/register';
import { expectedTerminals } from '../contract/expected-terminals';
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
  readonly scheme: Scheme;
}

/** A line as the worker needs it on every measurement. */
export interface RosterLine {
  readonly id: number;
  readonly key: string;
  readonly ratingAmps: number;
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
  { workerIndex, workerCount }: { workerIndex: number; workerCount: number },
): Roster {
  const own = register.filter(({ key }) => ownerOf(key, workerCount) === workerIndex);
  return new Map(own.map((line) => [line.key, rosterLine(line)]));
}

function rosterLine(line: RegisteredLine): RosterLine {
  return {
    id: line.id,
    key: line.key,
    ratingAmps: line.ratingAmps,
    goesBy: line.goesBy,
    inService: line.inService,
    obstacle: obstacle(line),
    terminals: new Map(
      line.terminals.map(({ key, substationName }) => [
        key,
        { id: line.terminalIds.get(key)!, key, substationName },
      ]),
    ),
    expected: expectedTerminals(line),
    versions: line.settings.map(({ id, validFrom, characteristic, restraint }) => ({
      id,
      fromMs: Date.parse(validFrom),
      scheme: { characteristic, restraint },
    })),
  };
}

/** The settings version in force at an instant, or undefined before the first. */
export function versionInForce(line: RosterLine, atMs: number): SchemeVersion | undefined {
  return line.versions.findLast((version) => version.fromMs <= atMs);
}
