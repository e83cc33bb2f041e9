import type { RegisterLine } from '../contract/register';
import type { CharacteristicOnWire } from '../contract/settings-version';
import type { Restraint } from '../protection/restraint';
import { terminalCountText } from './register-words';

/** The choices that a form of settings offers, in words. */

interface Offered {
  readonly label: string;
  readonly hint: string;
}
interface OfferedFor {
  readonly terminalCount: number;
  readonly goesBy: RegisterLine['goesBy'];
}

const NEEDS_PHASORS = ' This line’s feed holds magnitudes alone, so it could not be evaluated.';
const onPhasors = (goesBy: OfferedFor['goesBy']): string => (goesBy === 'reported' ? NEEDS_PHASORS : '');

export const KIND_CHOICES: Readonly<Record<CharacteristicOnWire['kind'], (line: OfferedFor) => Offered>> = {
  'two-slope': () => ({
    label: 'two-slope restraint',
    hint: 'A threshold that grows with the restraint current by two slopes.',
  }),
  adaptive: () => ({
    label: 'adaptive restraint',
    hint: 'A threshold that is the pickup and the sum of the errors that are allowed for.',
  }),
  'alpha-plane': ({ terminalCount, goesBy }) => ({
    label: 'alpha plane',
    hint: `A region in the plane of the two ends’ current ratio.${
      terminalCount > 2
        ? ` Over this line’s ${terminalCountText(terminalCount)} it goes by the generalised two-terminal equivalent.`
        : ''
    }${onPhasors(goesBy)}`,
  }),
  'phase-comparison': ({ terminalCount, goesBy }) => ({
    label: 'phase comparison',
    hint:
      terminalCount > 2
        ? `A scheme of two terminals; this line has ${terminalCountText(terminalCount)}, so it cannot be recorded here.`
        : `The angle between two ends’ currents against a tolerance.${onPhasors(goesBy)}`,
  }),
};

export const RESTRAINT_CHOICES: Readonly<Record<Restraint['kind'], Offered>> = {
  'scaled-sum': { label: 'a share of the sum', hint: 'A factor times the sum of the terminals’ magnitudes.' },
  maximum: { label: 'the greatest', hint: 'The greatest of the terminals’ magnitudes.' },
  'error-sum': { label: 'the sum of errors', hint: 'The pickup and what the errors allowed for add up to.' },
  none: { label: 'none', hint: 'The characteristic forms no restraint current.' },
};

export const SLOPE_STARTS: readonly (Offered & { readonly value: string })[] = [
  {
    value: 'from-zero',
    label: 'aimed at zero',
    hint: 'The threshold is the pickup until the slope’s line through the origin rises above it.',
  },
  {
    value: 'from-pickup',
    label: 'on top of the pickup',
    hint: 'The threshold leaves the pickup at zero restraint and grows by the slope from there.',
  },
];
