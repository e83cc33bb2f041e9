import type { FeedHealth } from '../../contract/feed-health';
import { refusalListAddress } from '../../view/feed-refusals';
import { instantText } from '../../view/figures';

interface RefusalCountsProps {
  refusals: FeedHealth['refusals'];
  nowMs: number;
  timeZone: string;
}

/** Every reason that has occurred, with how often and when last; each leads to the messages kept of it. */
export function RefusalCounts({ refusals, nowMs, timeZone }: RefusalCountsProps) {
  if (refusals.length === 0) return <p className="mt-2 text-ink-2">Nothing has been refused so far.</p>;
  return (
    <table className="figures mt-1">
      <thead>
        <tr>
          <th scope="col">reason</th>
          <th scope="col" className="figure">
            messages
          </th>
          <th scope="col" className="figure">
            last
          </th>
        </tr>
      </thead>
      <tbody>
        {refusals.map(({ reason, count, lastAt }) => (
          <tr key={reason}>
            <td>
              <a href={refusalListAddress({ reason, before: undefined })} className="link">
                {reason}
              </a>
            </td>
            <td className="figure">{count.toLocaleString('en-GB')}</td>
            <td className="figure text-ink-2">{instantText(lastAt, nowMs, timeZone)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
