import type { LineSummary } from '../contract/lines';
import { WARNING_KINDS, type Warning } from '../contract/warning';
import { instantText } from './figures';
import type { SiteCustom } from './site-custom';

export interface OpenWarning {
  readonly warning: Warning;
  readonly substations: LineSummary['substations'];
}

const waits = (warning: Warning): boolean => warning.acknowledgedAt === null;

/** The open warnings of all lines: unacknowledged first, worse kinds before milder ones, then the newest. */
export function openWarnings(lines: readonly LineSummary[]): OpenWarning[] {
  return lines
    .flatMap(({ warnings, substations }) => warnings.map((warning) => ({ warning, substations })))
    .filter(({ warning }) => warning.state !== 'normal')
    .sort(
      ({ warning: one }, { warning: other }) =>
        Number(waits(other)) - Number(waits(one)) ||
        WARNING_KINDS.indexOf(one.kind) - WARNING_KINDS.indexOf(other.kind) ||
        Date.parse(other.openedAt) - Date.parse(one.openedAt),
    );
}

/** A warning's state in words, with whoever acknowledged it and the note. */
export function stateWords(warning: Warning, nowMs: number, site: SiteCustom): string {
  switch (warning.state) {
    case 'unacknowledged':
      return 'Unacknowledged';
    case 'returned to normal, unacknowledged':
      return 'Returned to normal, unacknowledged';
    case 'normal':
      return 'Normal';
    case 'acknowledged': {
      const at =
        warning.acknowledgedAt === null
          ? ''
          : `, ${instantText(warning.acknowledgedAt, nowMs, site.timeZone)}`;
      const note = warning.note === null ? '' : `: “${warning.note}”`;
      return `Acknowledged by ${warning.acknowledgedBy ?? 'someone'}${at}${note}`;
    }
  }
}
