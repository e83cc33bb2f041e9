import type { SiteCustom } from '../../view/site-custom';
import { FollowUpItem } from './FollowUpItem';
import type { FollowUps } from './use-follow-ups';

interface OpenFollowUpsProps {
  followUps: FollowUps;
  site: SiteCustom;
  nowMs: number;
  mayKeep: boolean;
  /** whether there is a row above at which one could be opened */
  hasRows: boolean;
}

/** Every follow-up that is open, the one due first first. */
export function OpenFollowUps({ followUps, site, nowMs, mayKeep, hasRows }: OpenFollowUpsProps) {
  const { open } = followUps;
  return (
    <section aria-labelledby="follow-ups" className="mt-10">
      <h2 id="follow-ups" className="font-medium text-ink-2">
        {open.length === 0 ? 'No open follow-ups' : `Open follow-ups, ${open.length}`}
      </h2>
      {open.length === 0 && mayKeep && hasRows && (
        <p className="mt-1 text-ink-2">One is opened at a line’s row above.</p>
      )}
      {open.length > 0 && (
        <ul className="mt-2 border-t border-hairline">
          {open.map((followUp) => (
            <li
              key={followUp.id}
              className="grid gap-x-6 gap-y-1 border-b border-hairline py-2 md:grid-cols-[16rem_minmax(0,1fr)]"
            >
              <a
                href={`/lines/${followUp.line}`}
                className="font-medium text-ink no-underline hover:underline"
              >
                {followUp.lineName}
              </a>
              <FollowUpItem
                followUp={followUp}
                site={site}
                nowMs={nowMs}
                onDone={mayKeep ? followUps.end : undefined}
              />
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
