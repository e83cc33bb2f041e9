import type { ChannelTruth } from './channel';
import type { ClockLoss, TimeFrom } from './clock';
import type { Three } from './complex';
import type { Gap } from './gap';
import type { LoadProfile } from './load';
import type { Ramp } from './ramp';
import type { TransformerTruth } from './transformer';

/** A stretch of line, whole: ohms and nanofarads of the stretch, positive sequence. */
export type Branch = {
  readonly resistanceOhm: number;
  readonly reactanceOhm: number;
  readonly capacitanceNf: number;
};

/** Error of one current transformer: ratio per unit (+0.01 shows 1 % too much), phase displacement in radians. */
export type CtError = { readonly ratio: number; readonly angleRad: number };

export type TerminalTruth = {
  readonly key: string;
  readonly ctErrors: Three<CtError>;
  readonly timeFrom: TimeFrom;
  readonly clockLoss?: ClockLoss;
  /** microseconds that its clock runs ahead, while it takes itself for right */
  readonly clockDrift?: Ramp;
  readonly replaced?: Replacement;
  /** stretches of days without a message */
  readonly gaps?: readonly Gap[];
  /** share of its messages that are lost before the broker */
  readonly missingShare: number;
};

/** A ratio error, per unit, that grows. */
export type RatioDrift = Ramp & { readonly terminal: string; readonly phase: 0 | 1 | 2 };

/** The capacitance of one phase that grows, per unit of what it was. */
export type CapacitanceDrift = Ramp & { readonly phase: 0 | 1 | 2 };

/** One phase's current transformer that gave way to another, on a day counted from the site’s epoch. */
export type Replacement = { readonly phase: 0 | 1 | 2; readonly atDay: number; readonly error: CtError };

/** All that is physically so about one line, and that no register records. */
export type LineTruth = {
  readonly key: string;
  readonly substation: string;
  readonly voltageKv: number;
  readonly ratingAmps: number;
  readonly terminals: readonly TerminalTruth[];
  /** one for a line with two terminals; one a terminal, up to the tee, for three */
  readonly branches: readonly Branch[];
  readonly load: LoadProfile;
  /** of a tee: the share of the through current that leaves by the second terminal */
  readonly secondShare: number;
  readonly transformer?: TransformerTruth;
  readonly ratioDrift?: RatioDrift;
  readonly capacitanceDrift?: CapacitanceDrift;
  readonly channel: ChannelTruth;
  readonly breakers: 'closed' | 'open';
  readonly hasVoltage: boolean;
  /** its terminals publish what they compute themselves beside the phasors */
  readonly reportsToo: boolean;
};
