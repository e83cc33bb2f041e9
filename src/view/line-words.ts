import type { LineSummary } from '../contract/lines';
import { kilometresText, kilovoltsText, percentText } from './figures';

/** "64 % of rating", or that the load is unknown */
export const loadWords = (line: Pick<LineSummary, 'throughRatio'>): string =>
  line.throughRatio === null ? 'load unknown' : `${percentText(line.throughRatio)} of rating`;

/** "18.4 km cable" */
export const buildWords = (line: Pick<LineSummary, 'lengthKm' | 'kind'>): string =>
  `${kilometresText(line.lengthKm)} ${line.kind}`;

/** "220 kV · 18.4 km cable · 64 % of rating" */
export const lineWords = (
  line: Pick<LineSummary, 'voltageKv' | 'lengthKm' | 'kind' | 'throughRatio'>,
): string => `${kilovoltsText(line.voltageKv)} · ${buildWords(line)} · ${loadWords(line)}`;

/** What the register calls a terminal's place; its key when no substation carries it. */
export const terminalName = (key: string, substations: Readonly<LineSummary['substations']>): string =>
  substations.find((substation) => substation.key === key)?.name ?? key;

/** "Quillby", "Quillby and Hask", "Quillby, Hask and Ostrel" */
export function listed(names: readonly string[]): string {
  if (names.length <= 1) return names[0] ?? '';
  return `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}
