import type { NotSeparableReason } from '../standing/separability';

/** Why a window can't tell the causes apart, and what would make it so: whole sentences. */
export function separabilityWords(reason: NotSeparableReason, terminals: readonly string[]): string {
  const named = (place: number): string => terminals[place] ?? `terminal ${place + 1}`;
  switch (reason.kind) {
    case 'no snapshots':
      return 'No snapshot of this window counts. Days on which the line carries ordinary load, with valid measurements, would tell.';
    case 'no voltage':
      return `None of the ${reason.snapshots} snapshots has a valid voltage, so charging can’t be told from the load. Voltages in the feed would tell.`;
    case 'too few snapshots':
      return `${reason.snapshots} snapshots are too few; at least ${reason.snapshotsNeeded} are needed.`;
    case 'too few days':
      return `${reason.days} ${reason.days === 1 ? 'day' : 'days'} with counting snapshots can’t be told from chance; ${reason.daysNeeded} are needed.`;
    case 'idle terminal':
      return `${named(reason.terminal)} carries next to no current, so its transformers show no mismatch. Days on which it is loaded would tell.`;
    case 'constant load':
      return 'The load hardly changes in this window, so what follows the load can’t be told from what follows the voltage. A window with load going up and down would tell.';
    case 'voltage and load proportional':
      return `Voltage and the load at ${named(reason.terminal)} go up and down together here, so their shares can’t be told apart. A window in which the load’s angle or size changes by itself would tell.`;
    case 'terminals proportional':
      return `${named(reason.terminals[0])} and ${named(reason.terminals[1])} are always loaded alike here, so their mismatches can’t be told apart. A window in which they are loaded unequally would tell.`;
    case 'one day decides':
      return 'A single day decides the whole result, so it can’t be trusted. More days with a changing load would tell.';
  }
}
