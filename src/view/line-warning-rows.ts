import type { Warning } from '../contract/warning';
import { causeWords } from './cause-words';
import type { WordsContext } from './cause-words';
import { durationText, instantText } from './figures';
import { DASH } from './line-figures';

/** One warning of a line's history, in words. */
export interface WarningRow {
  readonly id: number;
  readonly kind: Warning['kind'];
  readonly open: boolean;
  readonly state: Warning['state'];
  readonly cause: string;
  readonly opened: string;
  /** when it returned and after how long; a dash while it stands */
  readonly returned: string;
  readonly acknowledged: string;
  readonly note: string;
}

/** Open warnings first, each part newest first. */
export function warningRows(warnings: readonly Warning[], context: WordsContext): WarningRow[] {
  return [...warnings]
    .sort((one, other) => Number(isOpen(other)) - Number(isOpen(one)) || opened(other) - opened(one))
    .map((warning) => warningRow(warning, context));
}

const isOpen = (warning: Warning): boolean => warning.state !== 'normal';
const opened = (warning: Warning): number => Date.parse(warning.openedAt);

function warningRow(warning: Warning, context: WordsContext): WarningRow {
  const { timeZone } = context.site;
  const at = (instant: string) => instantText(instant, context.nowMs, timeZone);
  const { lead, rest } = causeWords(warning.cause, context);
  const lasted = warning.returnedAt === null ? undefined : Date.parse(warning.returnedAt) - opened(warning);
  return {
    id: warning.id,
    kind: warning.kind,
    open: isOpen(warning),
    state: warning.state,
    cause: `${lead}${rest}`,
    opened: at(warning.openedAt),
    returned:
      warning.returnedAt === null || lasted === undefined
        ? DASH
        : `${at(warning.returnedAt)}, after ${durationText(lasted)}`,
    acknowledged:
      warning.acknowledgedAt === null
        ? DASH
        : `${warning.acknowledgedBy ?? 'someone'}, ${at(warning.acknowledgedAt)}`,
    note: warning.note ?? DASH,
  };
}

/** What the page knew with what the stream brought since: newest state of each, past ones kept. */
export function withChangedWarnings(known: readonly Warning[], changed: Iterable<Warning>): Warning[] {
  const newest = new Map(known.map((warning) => [warning.id, warning]));
  for (const warning of changed) {
    const before = newest.get(warning.id);
    if (before === undefined || Date.parse(before.changedAt) <= Date.parse(warning.changedAt))
      newest.set(warning.id, warning);
  }
  return [...newest.values()];
}
