import { useState } from 'react';
import type { FollowUpInFull } from '../../contract/follow-ups';
import type { Work } from '../../contract/works';
import { doneWords } from '../../view/follow-up-words';
import type { SiteCustom } from '../../view/site-custom';
import { dayText } from '../../view/line-comparison';
import { doneWorkWords } from '../../view/work-words';

interface DoneFollowUpsProps {
  done: readonly FollowUpInFull[];
  site: SiteCustom;
  nowMs: number;
}

const ROWS_FIRST = 5;

/** Follow-ups that were done last, with the work that ended each and the way to its before and after. */
export function DoneFollowUps({ done, site, nowMs }: DoneFollowUpsProps) {
  const [most, setMost] = useState(ROWS_FIRST);
  if (done.length === 0) return null;
  return (
    <section aria-labelledby="done-follow-ups" className="mt-8">
      <h2 id="done-follow-ups" className="font-medium text-ink-2">
        Follow-ups done last
      </h2>
      <ul className="mt-2 border-t border-hairline">
        {done.slice(0, most).map((followUp) => (
          <li
            key={followUp.id}
            data-follow-up={followUp.id}
            className="grid gap-x-6 gap-y-1 border-b border-hairline py-2 md:grid-cols-[16rem_minmax(0,1fr)]"
          >
            <a href={`/lines/${followUp.line}`} className="font-medium text-ink no-underline hover:underline">
              {followUp.lineName}
            </a>
            <div className="min-w-0">
              <p className="text-pretty wrap-anywhere">
                {followUp.note}
                <span className="block text-caption text-ink-2">{doneWords(followUp, nowMs, site)}</span>
              </p>
              {followUp.works.map((work) => (
                <DoneWorkRow key={work.id} followUp={followUp} work={work} />
              ))}
            </div>
          </li>
        ))}
      </ul>
      {done.length > most && (
        <button type="button" className="button mt-2" onClick={() => setMost(done.length)}>
          Show {done.length - most} more
        </button>
      )}
    </section>
  );
}

function DoneWorkRow({ followUp, work }: { followUp: FollowUpInFull; work: Work }) {
  const words = `${dayText(work.doneOn)}, ${doneWorkWords(work, followUp.terminals)}`;
  if (work.withdrawn !== null)
    return (
      <p className="mt-1 wrap-anywhere text-ink-2">
        <s>{words}</s> (withdrawn)
      </p>
    );
  return (
    <p className="mt-1 wrap-anywhere">
      {words}{' '}
      <a
        className="link whitespace-nowrap"
        href={`/lines/${work.line}/compare?at=${work.doneOn}`}
        aria-label={`Compare ${followUp.lineName} before and after ${dayText(work.doneOn)}`}
      >
        Compare before and after
      </a>
    </p>
  );
}
