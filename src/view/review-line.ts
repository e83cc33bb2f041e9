import type { CompensationOnWire } from '../contract/compensation';
import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import type { Scheme } from '../protection/scheme';
import { schemeAtTerminals } from '../protection/scheme';
import type { Zone } from '../protection/zone';
import { lineSusceptanceMillisiemens, lineZone } from './line-zone';

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
  return lineSusceptanceMillisiemens(line, line.nominalFrequencyHz);
}

/** What lies between the terminals in service, as the register and the recorded settings say. */
export function reviewZone(
  line: ReviewLine,
  { chargingCompensation }: Pick<RecordedScheme, 'chargingCompensation'>,
): Zone {
  const expected = terminalsInService(line);
  const frequencyHz = line.nominalFrequencyHz;
  const nothingWithin = { windings: expected.map(() => undefined), charging: undefined };
  return lineZone(line, { expected, chargingCompensation, frequencyHz }) ?? nothingWithin;
}

/** The recorded scheme with its figures for the terminals in service. */
export function reviewScheme(line: ReviewLine, { characteristic, restraint }: RecordedScheme): Scheme {
  return schemeAtTerminals({ characteristic, restraint }, terminalsInService(line));
}

/** What is done to the measured currents before they add up, in words; undefined where they add up as measured. */
export function broughtBy(
  { inZoneTransformer }: Pick<ReviewLine, 'inZoneTransformer'>,
  compensation: CompensationOnWire,
): string | undefined {
  const done = [
    ...(inZoneTransformer === null ? [] : ['brought to the line’s side of the transformer']),
    ...(compensation === 'applied' ? ['each terminal’s share of the charging taken out'] : []),
  ];
  return done.length === 0 ? undefined : done.join(', ');
}
