import type { ChannelTruth } from './channel';
import type { ClockLoss, TimeFrom } from './clock';
import type { Three } from './complex';
import type { LoadProfile } from './load';
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
  /** share of its messages that are lost before the broker */
  readonly missingShare: number;
};

/** A ratio error that grows evenly from one day to another, both counted from the site’s epoch. */
export type RatioDrift = {
  readonly terminal: string;
  readonly phase: 0 | 1 | 2;
  readonly perDay: number;
  readonly fromDay: number;
  readonly toDay: number;
};

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
  readonly channel: ChannelTruth;
  readonly breakers: 'closed' | 'open';
  readonly hasVoltage: boolean;
  /** its terminals publish what they compute themselves beside the phasors */
  readonly reportsToo: boolean;
};
