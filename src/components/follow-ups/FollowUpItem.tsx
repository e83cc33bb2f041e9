import { useRef, useState } from 'react';
import type { FollowUpInFull } from '../../contract/follow-ups';
import type { FollowUpDone } from '../../contract/works';
import { dueWords, isOverdue, openedWords } from '../../view/follow-up-words';
import { comparedDay } from '../../view/line-comparison';
import type { SiteCustom } from '../../view/site-custom';
import { EndForm } from './EndForm';

interface FollowUpItemProps {
  followUp: FollowUpInFull;
  site: SiteCustom;
  nowMs: number;
  /** undefined for whoever may not */
  onDone: ((followUp: FollowUpInFull, done: FollowUpDone) => Promise<void>) | undefined;
}

/** One follow-up: what is to be done, until when, who asked for it, and the way to end it. */
export function FollowUpItem({ followUp, site, nowMs, onDone }: FollowUpItemProps) {
  const [ending, setEnding] = useState(false);
  const cancelled = useRef(false);
  return (
    <div
      className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1"
      data-follow-up={followUp.id}
    >
      <p className="min-w-0 flex-1 basis-64 text-pretty wrap-anywhere">
        {followUp.note}{' '}
        <span className={isOverdue(followUp, nowMs) ? 'font-semibold' : 'text-ink-2'}>
          {dueWords(followUp, nowMs)}
        </span>
        <span className="block text-caption text-ink-2">{openedWords(followUp, nowMs, site)}</span>
      </p>
      {onDone !== undefined && !ending && (
        <button
          type="button"
          className="button"
          ref={(button) => {
            if (!cancelled.current || button === null) return;
            cancelled.current = false;
            button.focus();
          }}
          onClick={() => setEnding(true)}
          aria-label={`Done: ${followUp.note}, ${followUp.lineName}`}
        >
          Done
        </button>
      )}
      {onDone !== undefined && ending && (
        <EndForm
          followUp={followUp}
          today={comparedDay(new Date(nowMs).toISOString(), site.timeZone)}
          onEnd={onDone}
          onClose={() => {
            cancelled.current = true;
            setEnding(false);
          }}
        />
      )}
    </div>
  );
}
