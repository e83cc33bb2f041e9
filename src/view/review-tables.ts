import type { ReviewCloud } from '../contract/review';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import type { PerPhase } from '../protection/phase';
import type { PickupWindow } from '../protection/pickup-window';
import type { SequenceDifferential } from '../protection/sequence-differential';
import type { LineTable, TableColumn } from './line-table';
import { PHASES } from './phase';
import type { ExpectedLevels } from './review-expected';
import type { ReviewLoadability, ReviewSensitivity } from './review-margins';
import type { PhaseLetters } from './site-custom';

const figure = (head: string, digits = 1): TableColumn => ({ kind: 'figure', head, digits });
const text = (head: string): TableColumn => ({ kind: 'text', head });

/** What stands behind every figure of one panel: the phases' letters and the convention in words. */
interface TableContext {
  readonly letters: PhaseLetters;
  readonly convention: string;
}

const AXES = {
  restraint: { x: 'restraint, A', y: 'differential, A', toX: (x: number) => x },
  'alpha-plane': { x: '|k|', y: 'arg k less 180°, °', toX: Math.exp },
  'phase-comparison': { x: 'smaller current, A', y: 'deviation, °', toX: (x: number) => x },
} as const;

/** The cloud's cells, fullest first. */
export function cloudTable(cloud: ReviewCloud, { letters, convention }: TableContext): LineTable | undefined {
  const { x, y, plane } = cloud;
  if (x === null || y === null || plane === null) return undefined;
  const axes = AXES[plane];
  const digits = plane === 'restraint' ? 1 : 4;
  const rows = PHASES.flatMap((phase) =>
    cloud.cells[phase].map(([column, row, count]) => [
      letters[phase],
      axes.toX(x.least + column * x.step),
      axes.toX(x.least + (column + 1) * x.step),
      y.least + row * y.step,
      y.least + (row + 1) * y.step,
      count,
      convention,
    ]),
  ).sort((one, other) => Number(other[5]) - Number(one[5]));
  return {
    caption: 'Where the qualified snapshots lie',
    columns: [
      text('phase'),
      figure(`${axes.x} from`, digits),
      figure(`${axes.x} to`, digits),
      figure(`${axes.y} from`, digits),
      figure(`${axes.y} to`, digits),
      figure('snapshots', 0),
      text('convention'),
    ],
    rows,
  };
}

export function expectedTable(levels: ExpectedLevels, { letters, convention }: TableContext): LineTable {
  return {
    caption: 'Expected against measured standing level',
    columns: [text('phase'), text('figure'), figure('A primary', 2), text('convention')],
    rows: PHASES.flatMap((phase) => {
      const { expected, measuredAmps } = levels.phases[phase];
      const row = (name: string, amps: number | null | undefined) => [
        letters[phase],
        name,
        amps ?? null,
        convention,
      ];
      return [
        ...expected.terms.map(({ cause, amps }) => row(cause, amps)),
        ...expected.missing.map((cause) => row(cause, undefined)),
        row('least that must be left', expected.leastAmps),
        row('total, causes independent', expected.rootSumSquareAmps),
        row('total, worst case', expected.worstCaseAmps),
        row('measured standing level, 24 h', measuredAmps),
      ];
    }),
  };
}

export function loadTable(
  phases: PerPhase<ReviewLoadability | NotComputable>,
  { letters, convention }: TableContext,
): LineTable | undefined {
  const rows = PHASES.flatMap((phase) => {
    const load = phases[phase];
    if (!isComputable(load)) return [];
    return load.path.map((point) => [
      letters[phase],
      point.throughAmps,
      (point.lagRad * 180) / Math.PI,
      point.differentialAmps,
      point.restraintAmps ?? null,
      100 * point.utilisation,
      `${load.words} ${convention}`,
    ]);
  });
  if (rows.length === 0) return undefined;
  return {
    caption: 'Predicted operating points from no load to emergency rating',
    columns: [
      text('phase'),
      figure('through current, A', 0),
      figure('worst angle of lag, °', 0),
      figure('differential, A'),
      figure('restraint, A'),
      figure('utilisation, %'),
      text('convention'),
    ],
    rows,
  };
}

export function sensitivityTable(
  found: readonly { readonly fedFrom: string; readonly figures: ReviewSensitivity }[],
  { letters, convention }: TableContext,
): LineTable {
  return {
    caption: 'Smallest internal fault seen',
    columns: [
      text('fed from'),
      text('over'),
      text('phase'),
      figure('fault current, A'),
      figure('fault resistance, Ω', 0),
      text('convention'),
    ],
    rows: found.flatMap(({ fedFrom, figures }) => [
      sensitivityRow([fedFrom, 'no load', 'any'], figures.noLoad, convention),
      ...PHASES.map((phase) =>
        sensitivityRow([fedFrom, 'present load', letters[phase]], figures.presentLoad[phase], convention),
      ),
    ]),
  };
}

function sensitivityRow(
  names: readonly string[],
  found: ReviewSensitivity['noLoad'],
  convention: string,
): (string | number | null)[] {
  if (!isComputable(found)) return [...names, null, null, found.notComputable];
  return [...names, found.faultAmps ?? null, found.faultResistanceOhm ?? null, convention];
}

export function sequenceTable(
  found: Readonly<Record<'zero' | 'positive' | 'negative', SequenceDifferential>>,
  convention: string,
): LineTable {
  return {
    caption: 'Sequence differentials',
    columns: [text('sequence'), figure('differential, A', 2), figure('restraint, A', 1), text('convention')],
    rows: (['zero', 'positive', 'negative'] as const).map((sequence) => [
      sequence,
      found[sequence].differentialAmps,
      found[sequence].restraintAmps ?? null,
      convention,
    ]),
  };
}

export function pickupTable(
  { lowerAmps, upperAmps, pickupAmps }: PickupWindow & { readonly pickupAmps: number },
  convention: string,
): LineTable {
  return {
    caption: 'Pickup window',
    columns: [text('figure'), figure('A primary'), text('convention')],
    rows: [
      ['lower bound', lowerAmps, convention],
      ['recorded pickup', pickupAmps, convention],
      ['upper bound', upperAmps ?? null, convention],
    ],
  };
}
