import type { FollowUpInFull } from '../contract/follow-ups';
import type { FollowUp } from '../contract/standing';
import { dateText, instantText } from './figures';
import type { SiteCustom } from './site-custom';

/** Whether the day it was due has passed. */
export const isOverdue = ({ due, state }: Pick<FollowUp, 'due' | 'state'>, nowMs: number): boolean =>
  state === 'open' && due !== null && due < new Date(nowMs).toISOString().slice(0, 10);

/** "due 12 Jan 2027", "overdue since 3 Feb 2026", "without a date" */
export function dueWords(followUp: Pick<FollowUp, 'due' | 'state'>, nowMs: number): string {
  if (followUp.due === null) return 'without a date';
  const day = dateText(`${followUp.due}T12:00:00Z`, 'UTC');
  return isOverdue(followUp, nowMs) ? `overdue since ${day}` : `due ${day}`;
}

/** "done 12 May 2026, 14:32, without recorded work" */
export function doneWords(
  { doneAt, works }: Pick<FollowUpInFull, 'doneAt' | 'works'>,
  nowMs: number,
  { timeZone }: SiteCustom,
): string {
  const done = doneAt === null ? 'done' : `done ${instantText(doneAt, nowMs, timeZone)}`;
  return works.length === 0 ? `${done}, without recorded work` : done;
}

/** "phase B, ratio mismatch, opened by Mira Solano, 12 May 2026, 14:32" */
export function openedWords(followUp: FollowUp, nowMs: number, site: SiteCustom): string {
  return [
    followUp.phase === null ? undefined : `phase ${site.phaseLetters[followUp.phase]}`,
    followUp.cause === 'not told' ? undefined : followUp.cause,
    `opened by ${followUp.openedBy}, ${instantText(followUp.openedAt, nowMs, site.timeZone)}`,
  ]
    .filter((words) => words !== undefined)
    .join(', ');
}
