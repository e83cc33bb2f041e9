import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { restraintConvention } from '../protection/restraint';
import { ampsText, kilometresText, kilovoltsText, percentText } from './figures';

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

/** "380 kV · 71 km overhead · 1200 A, emergency 1440 A · two terminals" */
export function lineFactsText(line: RegisterLine): string {
  const ratings = `${ampsText(line.ratingAmps)}, emergency ${ampsText(line.emergencyRatingAmps)}`;
  return [
    kilovoltsText(line.voltageKv),
    lengthAndKindText(line),
    ratings,
    terminalCountText(line.terminals.length),
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
  if (line.inZoneTransformer !== null)
    sentences.push('A transformer stands inside the zone: the line is recorded and not evaluated yet.');
  if (line.goesBy === 'phasors' && line.terminals.filter((terminal) => terminal.inService).length < 2)
    sentences.push('A differential needs two terminals in service.');
  return sentences;
}

/** "pickup 120 A · 30 % from zero up to 1500 A, then 60 %" */
export function characteristicText({ characteristic }: Pick<SettingsVersion, 'characteristic'>): string {
  const { pickupAmps, slope1, kneeAmps, slope2, slopeStart } = characteristic;
  const pickup = `pickup ${ampsText(pickupAmps)}`;
  if (kneeAmps === 0) return `${pickup} · ${percentText(slope2)} from the pickup on`;
  const start = slopeStart === 'from-zero' ? 'aimed at zero' : 'on top of the pickup';
  return `${pickup} · ${percentText(slope1)} ${start} up to ${ampsText(kneeAmps)}, then ${percentText(slope2)}`;
}

export const restraintText = ({ restraint }: Pick<SettingsVersion, 'restraint'>): string =>
  restraintConvention(restraint);
