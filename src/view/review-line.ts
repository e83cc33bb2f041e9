import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { lineSusceptanceMillisiemens, susceptanceMicrosiemensPerKm } from '../protection/charging';
import type { Scheme } from '../protection/scheme';
import { schemeAtTerminals } from '../protection/scheme';
import type { WindingCompensation } from '../protection/winding-compensation';
import type { Zone } from '../protection/zone';

/** What a review knows of a line beside what moves: its constants, and the load that its standing level stood under. */
export interface ReviewLine extends Pick<
  RegisterLine,
  | 'key'
  | 'voltageKv'
  | 'ratingAmps'
  | 'emergencyRatingAmps'
  | 'lengthKm'
  | 'capacitanceNfPerKm'
  | 'leastInternalFaultAmps'
  | 'goesBy'
  | 'seriesCompensated'
  | 'inZoneTransformer'
  | 'terminals'
> {
  readonly nominalFrequencyHz: number;
  /** mean through current of the qualified snapshots of the last 24 hours, amperes; null when there were none */
  readonly dayThroughAmps: number | null;
}

type RecordedScheme = Pick<SettingsVersion, 'characteristic' | 'restraint' | 'chargingCompensation'>;

/** Keys of the terminals whose currents add up, in the register's order. */
export function terminalsInService({ terminals }: Pick<ReviewLine, 'terminals'>): readonly string[] {
  return [...terminals]
    .sort((one, other) => one.position - other.position)
    .filter(({ inService }) => inService)
    .map(({ key }) => key);
}

/** ωC′l of the whole line at nominal frequency, millisiemens; undefined when the capacitance is not recorded. */
export function susceptanceMillisiemens(
  line: Pick<ReviewLine, 'capacitanceNfPerKm' | 'lengthKm' | 'nominalFrequencyHz'>,
): number | undefined {
  if (line.capacitanceNfPerKm === null) return undefined;
  return lineSusceptanceMillisiemens({
    susceptanceMicrosiemensPerKm: susceptanceMicrosiemensPerKm(
      line.capacitanceNfPerKm,
      line.nominalFrequencyHz,
    ),
    lengthKm: line.lengthKm,
  });
}

/** What lies between the terminals in service, as the register and the recorded settings say. */
export function reviewZone(
  line: ReviewLine,
  { chargingCompensation }: Pick<RecordedScheme, 'chargingCompensation'>,
): Zone {
  return {
    windings: terminalsInService(line).map((key) => windingAt(line, key)),
    charging: chargingCompensation ? { susceptanceMillisiemens: susceptanceMillisiemens(line) } : undefined,
  };
}

/** The recorded scheme with its figures for the terminals in service. */
export function reviewScheme(line: ReviewLine, { characteristic, restraint }: RecordedScheme): Scheme {
  return schemeAtTerminals({ characteristic, restraint }, terminalsInService(line));
}

function windingAt(
  { inZoneTransformer, voltageKv }: ReviewLine,
  key: string,
): WindingCompensation | undefined {
  if (inZoneTransformer === null) return undefined;
  const { otherTerminals, otherVoltageKv, clockNumber, removesZeroSequence } = inZoneTransformer;
  const removed = (is: boolean) => (is ? 'removed' : 'kept');
  if (!otherTerminals.includes(key)) {
    return { ratio: 1, clockNumber: 0, zeroSequence: removed(removesZeroSequence.line) };
  }
  return {
    ratio: voltageKv / otherVoltageKv,
    clockNumber,
    zeroSequence: removed(removesZeroSequence.other),
  };
}
