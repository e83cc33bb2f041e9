import type { LineSummary } from '../contract/lines';
import { ampsText } from './figures';
import { PHASES } from './phase';
import type { LineTable, TableColumn } from './line-table';
import { inUnit, unitSign } from './line-unit';
import type { CurrentUnit } from './line-unit';
import type { Reading } from './line-readings';
import type { PhaseLetters } from './site-custom';

interface PlaneTableContext {
  readonly letters: PhaseLetters;
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
}

/** What the plane draws, as rows: the operating points of the tails, newest first. */
export function planeTable(
  readings: readonly Reading[],
  { letters, unit, ratingAmps }: PlaneTableContext,
): LineTable {
  const figure = (head: string): TableColumn => ({
    kind: 'figure',
    head: `${head}, ${unitSign(unit)}`,
    digits: unit === 'amperes' ? 1 : 4,
  });
  const shown = (amps: number | null) => inUnit(amps, unit, ratingAmps);
  return {
    caption: 'Operating points of the last ten minutes',
    columns: [
      { kind: 'instant', head: 'instant' },
      { kind: 'text', head: 'phase' },
      figure('restraint'),
      figure('differential'),
      figure('threshold'),
      { kind: 'figure', head: 'utilisation, %', digits: 1 },
    ],
    rows: [...readings].reverse().flatMap(({ atMs, phases }) =>
      PHASES.map((phase) => {
        const { restraintAmps, differentialAmps, thresholdAmps, utilisation } = phases[phase];
        return [
          atMs,
          letters[phase],
          shown(restraintAmps),
          shown(differentialAmps),
          shown(thresholdAmps),
          utilisation === null ? null : 100 * utilisation,
        ];
      }),
    ),
  };
}

/** The plane in a sentence, for whoever does not see it. */
export function planeSentence(
  { phases, pickupAmps }: Pick<LineSummary, 'phases' | 'pickupAmps'>,
  letters: PhaseLetters,
): string {
  const told = PHASES.flatMap((phase) => {
    const { differentialAmps, restraintAmps } = phases[phase];
    if (differentialAmps === null || restraintAmps === null) return [];
    return [`phase ${letters[phase]} at ${ampsText(differentialAmps)} against ${ampsText(restraintAmps)}`];
  });
  const points = told.length === 0 ? 'no operating point can be computed now' : told.join(', ');
  const threshold =
    pickupAmps === null ? 'no threshold is recorded' : `the threshold begins at ${ampsText(pickupAmps)}`;
  return `Operating plane, differential against restraint current: ${points}; ${threshold}.`;
}
