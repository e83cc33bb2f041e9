import type { CharacteristicOnWire } from '../contract/settings-version';
import type { ReplayLine } from './replay-problems';

/** One figure of the form. */
export interface ReplayField {
  readonly name: string;
  readonly label: string;
  readonly unit: string;
  /** what is asked for, after "Give" */
  readonly missing: string;
  /** fields of one terminal stand together under its name */
  readonly group?: string;
}

/** The last part of the names of fields that are typed in per cent and held as ratios. */
export const ratioFields: ReadonlySet<string> = new Set(['slope1', 'slope2', 'errorBelow', 'errorAbove']);

const PICKUP: ReplayField = {
  name: 'pickupAmps',
  label: 'Pickup',
  unit: 'A primary',
  missing: 'the pickup in amperes primary',
};

export const KIND_OPTIONS: readonly { value: CharacteristicOnWire['kind']; label: string }[] = [
  { value: 'two-slope', label: 'Two slopes' },
  { value: 'adaptive', label: 'Adaptive' },
  { value: 'alpha-plane', label: 'Alpha plane' },
  { value: 'phase-comparison', label: 'Phase comparison' },
];

/** The figures that a kind of characteristic has, in the order of the form: what is most often tried first. */
export function replayFields(kind: CharacteristicOnWire['kind'], line: ReplayLine): readonly ReplayField[] {
  switch (kind) {
    case 'two-slope':
      return [
        { name: 'slope1', label: 'First slope', unit: '%', missing: 'the first slope in per cent' },
        PICKUP,
        { name: 'slope2', label: 'Second slope', unit: '%', missing: 'the second slope in per cent' },
        {
          name: 'kneeAmps',
          label: 'Knee, in restraint',
          unit: 'A primary',
          missing: 'the knee in amperes of restraint; 0 where there is none',
        },
      ];
    case 'adaptive':
      return [PICKUP, TIME_ERROR, ...line.terminals.flatMap(terminalFields)];
    case 'alpha-plane':
      return [
        PICKUP,
        { name: 'radius', label: 'Radius', unit: '', missing: 'the outer radius, above 1' },
        { name: 'angleDeg', label: 'Angle around 180°', unit: '°', missing: 'the angle in degrees' },
      ];
    case 'phase-comparison':
      return [
        { name: 'toleranceDeg', label: 'Tolerance', unit: '°', missing: 'the tolerance in degrees' },
        {
          name: 'releaseAmps',
          label: 'Release current',
          unit: 'A primary',
          missing: 'the release current in amperes primary',
        },
      ];
  }
}

const TIME_ERROR: ReplayField = {
  name: 'timeErrorMs',
  label: 'Residual time error',
  unit: 'ms',
  missing: 'the residual time error in milliseconds; 0 where there is none',
};

function terminalFields({ substationName }: ReplayLine['terminals'][number], index: number): ReplayField[] {
  const field = (name: string, words: Pick<ReplayField, 'label' | 'unit' | 'missing'>): ReplayField => ({
    name: `ctErrors.${index}.${name}`,
    group: substationName,
    ...words,
  });
  return [
    field('errorBelow', { label: 'Error up to the limit', unit: '%', missing: 'the error in per cent' }),
    field('errorAbove', { label: 'Error above it', unit: '%', missing: 'the error in per cent' }),
    field('limitAmps', { label: 'Limit current', unit: 'A', missing: 'the limit current in amperes' }),
  ];
}
