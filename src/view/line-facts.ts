import type { LineSummary } from '../contract/lines';
import type { SettingsVersion } from '../contract/settings-version';
import { dateText, kilovoltsText } from './figures';
import { buildWords, loadWords } from './line-words';

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six'];

/** The facts beside a line's name, in the order a protection engineer asks for them. */
export function lineFacts(
  line: LineSummary,
  {
    terminalCount,
    inForce,
    timeZone,
  }: {
    terminalCount: number;
    inForce: SettingsVersion | undefined;
    timeZone: string;
  },
): string[] {
  const facts = [kilovoltsText(line.voltageKv), buildWords(line), terminalsWords(terminalCount)];
  if (line.owner !== null) facts.push(`of ${line.owner}`);
  if (line.seriesCompensated) facts.push('series-compensated');
  if (line.inZoneTransformer !== null) {
    facts.push(`transformer in the zone to ${kilovoltsText(line.inZoneTransformer.otherVoltageKv)}`);
  }
  if (line.goesBy === 'reported') facts.push('by reported magnitudes');
  facts.push(
    inForce === undefined ? 'no settings recorded' : `settings of ${dateText(inForce.validFrom, timeZone)}`,
  );
  facts.push(loadWords(line));
  return facts;
}

function terminalsWords(count: number): string {
  const word = COUNTS[count] ?? String(count);
  return `${word} ${count === 1 ? 'terminal' : 'terminals'}`;
}
