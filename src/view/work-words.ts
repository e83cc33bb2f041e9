import type { Work } from '../contract/works';
import { instantText } from './figures';
import { terminalName } from './line-words';
import type { SiteCustom } from './site-custom';

/** A line's terminals by the names of their substations. */
export type NamedTerminals = readonly { readonly key: string; readonly name: string }[];

export const namedTerminals = (
  terminals: readonly { readonly key: string; readonly substationName: string }[],
): NamedTerminals => terminals.map(({ key, substationName }) => ({ key, name: substationName }));

/** "work at Skelder: transformer exchanged", or "work: …" where it was on the line itself */
export const doneWorkWords = (
  { terminal, what }: Pick<Work, 'terminal' | 'what'>,
  terminals: NamedTerminals,
): string => `${terminal === null ? 'work' : `work at ${terminalName(terminal, terminals)}`}: ${what}`;

interface WorkContext {
  readonly site: SiteCustom;
  readonly nowMs: number;
}

/** "at Low Pell, recorded by Mira Solano, 12 May 2026, 14:32" */
export function workWords(
  { terminal, recordedBy, recordedAt }: Work,
  {
    terminals,
    site,
    nowMs,
  }: WorkContext & { readonly terminals: readonly { readonly key: string; readonly name: string }[] },
): string {
  const place = terminals.find(({ key }) => key === terminal)?.name ?? terminal;
  const where = place === null ? '' : `at ${place}, `;
  return `${where}recorded by ${recordedBy}, ${instantText(recordedAt, nowMs, site.timeZone)}`;
}

/** "withdrawn by Mira Solano, 12 May 2026, 14:32: it parts nothing" */
export const withdrawnWords = ({ withdrawn }: Work, { site, nowMs }: WorkContext): string =>
  withdrawn === null
    ? ''
    : `withdrawn by ${withdrawn.by}, ${instantText(withdrawn.at, nowMs, site.timeZone)}: it parts nothing`;
