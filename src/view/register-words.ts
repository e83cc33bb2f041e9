import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import type { CtErrorAllowance } from '../protection/adaptive';
import { isThresholdCharacteristic } from '../protection/characteristic';
import { restraintConvention } from '../protection/restraint';
import { schemeAtTerminals, schemeProblems } from '../protection/scheme';
import type { TwoSlope } from '../protection/two-slope';
import { ampsText, kilometresText, kilovoltsText, percentText } from './figures';
import { percentTyped } from './register-amount';

/** How entries of the register are put in words, one way for list, page and form. */

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six'];

export function terminalCountText(count: number): string {
  return `${COUNTS[count] ?? String(count)} ${count === 1 ? 'terminal' : 'terminals'}`;
}

/** "18.4 km cable" */
export const lengthAndKindText = ({ lengthKm, kind }: Pick<RegisterLine, 'lengthKm' | 'kind'>): string =>
  `${kilometresText(lengthKm)} ${kind}`;

export const goesByText = (goesBy: RegisterLine['goesBy']): string =>
  goesBy === 'phasors' ? 'phasors' : 'reported magnitudes';

/** "380 kV · 71 km overhead · 1200 A, emergency 1440 A · two terminals · of Tarnside Transmission" */
export function lineFactsText(line: RegisterLine): string {
  const ratings = `${ampsText(line.ratingAmps)}, emergency ${ampsText(line.emergencyRatingAmps)}`;
  return [
    kilovoltsText(line.voltageKv),
    lengthAndKindText(line),
    ratings,
    terminalCountText(line.terminals.length),
    ...(line.owner === null ? [] : [`of ${line.owner}`]),
  ].join(' · ');
}

/** What keeps a line from being evaluated, in a sentence each; none when nothing does. */
export function hindrances(line: RegisterLine, inForce: SettingsVersion | undefined): string[] {
  const sentences: string[] = [];
  if (!line.inService) sentences.push('The line is out of service.');
  if (inForce === undefined)
    sentences.push(
      line.settings.length === 0
        ? 'No settings are recorded, so the line is not evaluated.'
        : 'No recorded settings are in force yet, so the line is not evaluated.',
    );
  if (line.goesBy === 'phasors' && line.terminals.filter((terminal) => terminal.inService).length < 2)
    sentences.push('A differential needs two terminals in service.');
  return inForce === undefined ? sentences : [...sentences, ...schemeHindrances(line, inForce)];
}

/** Settings that once fitted the line may no longer do so: it was given a terminal, or lost a constant. */
function schemeHindrances(line: RegisterLine, inForce: SettingsVersion): string[] {
  const terminals = line.terminals.filter(({ inService }) => inService).map(({ key }) => key);
  const problems = schemeProblems(schemeAtTerminals(inForce, terminals), { terminals });
  const needsPhasors = !isThresholdCharacteristic(inForce.characteristic) && line.goesBy === 'reported';
  return [
    ...problems.map(({ problem }) => `The settings in force do not fit the line. ${problem}`),
    ...(needsPhasors
      ? [
          'The settings in force weigh phasors, and this line’s feed holds magnitudes alone: it is not evaluated.',
        ]
      : []),
    ...(inForce.chargingCompensation && line.capacitanceNfPerKm === null
      ? ['The scheme compensates the charging current, and the capacitance that this needs is not recorded.']
      : []),
  ];
}

/** "pickup 120 A · 30 % aimed at zero up to 1500 A, then 60 %" */
export function characteristicText({ characteristic }: Pick<SettingsVersion, 'characteristic'>): string {
  switch (characteristic.kind) {
    case 'two-slope':
      return twoSlopeText(characteristic);
    case 'adaptive':
      return `adaptive · pickup ${ampsText(characteristic.pickupAmps)} · ${characteristic.ctErrors
        .map(ctErrorText)
        .join(', ')} · time error ${characteristic.timeErrorMs} ms`;
    case 'alpha-plane':
      return `alpha plane · pickup ${ampsText(characteristic.pickupAmps)} · radius ${characteristic.radius} · angle ${characteristic.angleDeg}°`;
    case 'phase-comparison':
      return `phase comparison · tolerance ${characteristic.toleranceDeg}° · release ${ampsText(characteristic.releaseAmps)}`;
  }
}

function twoSlopeText({ pickupAmps, slope1, kneeAmps, slope2, slopeStart }: TwoSlope): string {
  const pickup = `pickup ${ampsText(pickupAmps)}`;
  if (kneeAmps === 0) return `${pickup} · ${percentText(slope2)} from the pickup on`;
  const start = slopeStart === 'from-zero' ? 'aimed at zero' : 'on top of the pickup';
  return `${pickup} · ${percentText(slope1)} ${start} up to ${ampsText(kneeAmps)}, then ${percentText(slope2)}`;
}

/** "arden 1 %, 5 % beyond 2400 A" */
export const ctErrorText = ({ terminal, errorBelow, errorAbove, limitAmps }: CtErrorAllowance): string =>
  `${terminal} ${percentTyped(errorBelow)} %, ${percentTyped(errorAbove)} % beyond ${ampsText(limitAmps)}`;

export const restraintText = ({ restraint }: Pick<SettingsVersion, 'restraint'>): string =>
  restraintConvention(restraint);

const PLANES: Readonly<Record<SettingsVersion['characteristic']['kind'], string>> = {
  'two-slope': 'Threshold against restraint',
  adaptive: 'Threshold against restraint',
  'alpha-plane': 'Ratio of the ends’ currents; restrains within the clear region',
  'phase-comparison': 'Angle between the ends’ currents; restrains within the clear sector',
};

/** What the drawing of a scheme shows. */
export const planeCaption = ({ characteristic }: Pick<SettingsVersion, 'characteristic'>): string =>
  PLANES[characteristic.kind];
