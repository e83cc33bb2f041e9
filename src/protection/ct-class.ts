/**
 * Limits of error of protective current transformers by accuracy class, IEC 61869-2:2012, tables 205 and 206, at
 * rated primary current, and the differential current that they leave room for.
 */
import { magnitude, phasorFromPolar, subtract } from './phasor';
import type { Phasor } from './phasor';

export const CT_CLASS_NAMES = ['5P', '10P', '5PR', 'PX', 'TPX', 'TPY', 'TPZ'] as const;
export type CtClassName = (typeof CT_CLASS_NAMES)[number];

/** What a class allows; errors as ratios (0.01 is 1 %), angles in radians. */
export interface CtClass {
  /** limit of the ratio error either way; for PX that of the turns ratio */
  readonly ratioError: number;
  /** the displacement about which the limit lies; 0 but for TPZ, whose air gap advances every current alike */
  readonly displacementRad: number;
  /** limit of the phase displacement either way; undefined where the class states none */
  readonly displacementLimitRad: number | undefined;
  /** composite error at the accuracy limit current; undefined where the class states none */
  readonly compositeError: number | undefined;
  /** greatest remanence factor; undefined where the class states none here */
  readonly remanenceMost: number | undefined;
}

const RAD_PER_MINUTE = Math.PI / (180 * 60);
const NOTHING_MORE = { displacementRad: 0, compositeError: undefined, remanenceMost: undefined };

export const CT_CLASSES: Readonly<Record<CtClassName, CtClass>> = {
  '5P': limits({ ratioError: 0.01, minutes: 60, compositeError: 0.05 }),
  '10P': limits({ ratioError: 0.03, minutes: undefined, compositeError: 0.1 }),
  '5PR': { ...limits({ ratioError: 0.01, minutes: 60, compositeError: 0.05 }), remanenceMost: 0.1 },
  PX: limits({ ratioError: 0.0025, minutes: undefined, compositeError: undefined }),
  TPX: limits({ ratioError: 0.005, minutes: 30, compositeError: undefined }),
  TPY: limits({ ratioError: 0.01, minutes: 60, compositeError: undefined }),
  TPZ: {
    ...limits({ ratioError: 0.01, minutes: 18, compositeError: undefined }),
    displacementRad: 180 * RAD_PER_MINUTE,
  },
};

/**
 * The class that a register's designation names, with its accuracy limit factor or dimensions behind it (`5P20`,
 * `5PR 20`, `TPY 15x7.5`); `undefined` for any other.
 */
export function ctClassNamed(designation: string): CtClassName | undefined {
  const [, name] = /^\s*(5PR|10P|5P|PX|TPX|TPY|TPZ)(?![A-Z])/i.exec(designation) ?? [];
  const upper = name?.toUpperCase();
  return CT_CLASS_NAMES.find((each) => each === upper);
}

/** The differential current that transformer errors within their classes can leave, per ampere of through current. */
export interface ClassBudget {
  readonly differentialRatio: number;
  /** false where a class states no limit for the phase displacement, and the budget is that of the ratio alone */
  readonly isDisplacementStated: boolean;
}

/**
 * What a transformer makes of 1∠0 with its errors at opposite or like limits: `ratioSign` and `displacementSign`
 * are +1 or −1. A displacement without a limit stays out.
 */
export function transformerAtLimit(
  ctClass: CtClass,
  { ratioSign, displacementSign }: { readonly ratioSign: number; readonly displacementSign: number },
): Phasor {
  const displacementRad = ctClass.displacementRad + displacementSign * (ctClass.displacementLimitRad ?? 0);
  return phasorFromPolar(1 + ratioSign * ctClass.ratioError, displacementRad);
}

/** The two ends' classes at opposite limits, the worse way round. */
export function pairBudget(one: CtClass, other: CtClass): ClassBudget {
  const left = LIMIT_SIGNS.map((signs) =>
    magnitude(subtract(transformerAtLimit(one, signs), transformerAtLimit(other, opposite(signs)))),
  );
  return {
    differentialRatio: Math.max(...left),
    isDisplacementStated: one.displacementLimitRad !== undefined && other.displacementLimitRad !== undefined,
  };
}

/**
 * The budget of a line with any number of terminals: that of its worst pair. However a through current divides
 * over the others, what it leaves is a mean of the pairs' and so no more than the worst one's. `undefined` for
 * fewer than two terminals.
 */
export function classBudget(classes: readonly CtClass[]): ClassBudget | undefined {
  const pairs = classes.flatMap((one, index) =>
    classes.slice(index + 1).map((other) => pairBudget(one, other)),
  );
  if (pairs.length === 0) return undefined;
  return {
    differentialRatio: Math.max(...pairs.map((pair) => pair.differentialRatio)),
    isDisplacementStated: pairs.every((pair) => pair.isDisplacementStated),
  };
}

/** The four corners of a class: ratio error and displacement each at one limit or the other. */
export const LIMIT_SIGNS = [
  { ratioSign: 1, displacementSign: 1 },
  { ratioSign: 1, displacementSign: -1 },
  { ratioSign: -1, displacementSign: 1 },
  { ratioSign: -1, displacementSign: -1 },
] as const;

export function opposite({ ratioSign, displacementSign }: (typeof LIMIT_SIGNS)[number]) {
  return { ratioSign: -ratioSign, displacementSign: -displacementSign };
}

function limits({
  ratioError,
  minutes,
  compositeError,
}: {
  ratioError: number;
  minutes: number | undefined;
  compositeError: number | undefined;
}): CtClass {
  const displacementLimitRad = minutes === undefined ? undefined : minutes * RAD_PER_MINUTE;
  return { ...NOTHING_MORE, ratioError, displacementLimitRad, compositeError };
}
