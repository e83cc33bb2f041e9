import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { pickupAmps } from '../protection/characteristic';
import { chargingAmps, chargingMva, susceptanceMicrosiemensPerKm } from '../protection/charging';
import { ampsText, kilometresText, kilovoltsText } from './figures';

type RecordedSettings = Pick<SettingsVersion, 'characteristic'>;

/** The expected charging current, worked through with the line's own figures. */
export interface ChargingExample {
  readonly susceptance: string;
  readonly working: string;
  readonly total: string;
  readonly perEnd: string;
  readonly power: string;
  /** how much of a pickup the charging takes without compensation, as a ratio; undefined without settings */
  readonly ofPickup: number | undefined;
}

/** Undefined when the capacitance is not known: nothing can be expected then. */
export function chargingExample(
  line: Pick<RegisterLine, 'capacitanceNfPerKm' | 'lengthKm' | 'voltageKv'>,
  { inForce, frequencyHz }: { inForce: RecordedSettings | undefined; frequencyHz: number },
): ChargingExample | undefined {
  if (line.capacitanceNfPerKm === null) return undefined;
  const susceptance = susceptanceMicrosiemensPerKm(line.capacitanceNfPerKm, frequencyHz);
  const charged = {
    susceptanceMicrosiemensPerKm: susceptance,
    lengthKm: line.lengthKm,
    voltageKv: line.voltageKv,
  };
  const pickup = inForce && pickupAmps(inForce.characteristic);
  const totalAmps = chargingAmps(charged);
  const figures = [
    `2π · ${frequencyHz} Hz`,
    `${line.capacitanceNfPerKm} nF/km`,
    kilometresText(line.lengthKm),
    `${kilovoltsText(line.voltageKv)} / √3`,
  ];
  return {
    susceptance: `${susceptance.toPrecision(3)} µS/km`,
    working: figures.join(' · '),
    total: ampsText(totalAmps),
    perEnd: ampsText(totalAmps / 2),
    power: `${chargingMva(charged).toPrecision(3)} Mvar`,
    ofPickup: pickup === undefined ? undefined : totalAmps / pickup,
  };
}
