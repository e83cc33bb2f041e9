import type { RegisterLine } from '../contract/register';
import { susceptanceMicrosiemensPerKm } from '../protection/charging';
import type { WindingCompensation } from '../protection/winding-compensation';
import type { Zone } from '../protection/zone';

type ZoneFacts = Pick<RegisterLine, 'voltageKv' | 'lengthKm' | 'capacitanceNfPerKm' | 'inZoneTransformer'>;

/** What lies in a line's zone by the register, for its terminals in this order; undefined where nothing does. */
export function lineZone(
  line: ZoneFacts,
  zone: { expected: readonly string[]; chargingCompensation: boolean; frequencyHz: number },
): Zone | undefined {
  if (line.inZoneTransformer === null && !zone.chargingCompensation) return undefined;
  return {
    windings: zone.expected.map((terminal) => winding(line, terminal)),
    charging: zone.chargingCompensation
      ? { susceptanceMillisiemens: lineSusceptanceMillisiemens(line, zone.frequencyHz) }
      : undefined,
  };
}

/** ωC′l of the whole line; undefined where the register does not hold its capacitance. */
export function lineSusceptanceMillisiemens(
  { capacitanceNfPerKm, lengthKm }: Pick<ZoneFacts, 'capacitanceNfPerKm' | 'lengthKm'>,
  frequencyHz: number,
): number | undefined {
  if (capacitanceNfPerKm === null) return undefined;
  return (susceptanceMicrosiemensPerKm(capacitanceNfPerKm, frequencyHz) * lengthKm) / 1000;
}

function winding(
  { voltageKv, inZoneTransformer }: ZoneFacts,
  terminal: string,
): WindingCompensation | undefined {
  if (inZoneTransformer === null) return undefined;
  const { otherVoltageKv, clockNumber, otherTerminals, removesZeroSequence } = inZoneTransformer;
  if (otherTerminals.includes(terminal))
    return {
      ratio: voltageKv / otherVoltageKv,
      clockNumber,
      zeroSequence: removesZeroSequence.other ? 'removed' : 'kept',
    };
  return removesZeroSequence.line ? { ratio: 1, clockNumber: 0, zeroSequence: 'removed' } : undefined;
}

/** What a scheme takes out of the differential by compensation, millisiemens; 0 where it does not or can't. */
export function compensatedMillisiemens(
  line: Pick<ZoneFacts, 'capacitanceNfPerKm' | 'lengthKm'>,
  { isCompensated, frequencyHz }: { isCompensated: boolean; frequencyHz: number },
): number {
  return isCompensated ? (lineSusceptanceMillisiemens(line, frequencyHz) ?? 0) : 0;
}
