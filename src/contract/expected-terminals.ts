import type { RegisterLine } from './register';

interface Expectation {
  readonly goesBy: RegisterLine['goesBy'];
  /** in position order */
  readonly terminals: readonly { readonly key: string; readonly inService: boolean }[];
}

/** Terminals whose measurements make a snapshot of the line complete. */
export function expectedTerminals(line: Expectation): readonly string[] {
  const inService = line.terminals.filter((terminal) => terminal.inService).map(({ key }) => key);
  // the historian of a line that goes by reported magnitudes holds what its first terminal computed
  return line.goesBy === 'reported' ? inService.slice(0, 1) : inService;
}
