import { useRef, useState } from 'react';
import type { Work } from '../../contract/works';
import { dayText } from '../../view/line-comparison';
import type { SiteCustom } from '../../view/site-custom';
import { withdrawnWords, workWords } from '../../view/work-words';
import { useWorks, type Works } from './use-works';
import { WorkForm } from './WorkForm';

interface RecordedWorksProps {
  line: { readonly key: string; readonly name: string };
  works: readonly Work[];
  terminals: readonly { readonly key: string; readonly name: string }[];
  site: SiteCustom;
  nowMs: number;
  /** today by the site's clock */
  today: string;
  mayRecord: boolean;
}

/** Each is a date to compare across: more of them than this would push the comparison out of sight. */
const ROWS_FIRST = 6;

/** What was done on the line: each a date to compare across, and a mark that parts its trends. */
export function RecordedWorks({ works: initial, ...props }: RecordedWorksProps) {
  const { line, terminals, today, mayRecord } = props;
  const works = useWorks(line.key, initial);
  const [writing, setWriting] = useState(false);
  const [most, setMost] = useState(ROWS_FIRST);
  const recordButton = useFocusBack();
  return (
    <section aria-labelledby="works-title" className="mt-6 max-w-[80ch]">
      <h2 id="works-title" className="m-0 text-body font-semibold">
        Recorded works
      </h2>
      <p role="status" className="mt-1 font-medium empty:hidden">
        {works.told}
      </p>
      <p role="alert" className="field-problem mt-1 empty:hidden">
        {works.problem}
      </p>
      {works.list.length === 0 ? (
        <p className="mt-1 text-ink-2">No work is recorded on this line.</p>
      ) : (
        <ul className="mt-1 border-t border-hairline">
          {works.list.slice(0, most).map((work) => (
            <WorkItem key={work.id} {...{ ...props, work, works }} />
          ))}
        </ul>
      )}
      {works.list.length > most && (
        <button type="button" className="button mt-2 mr-2" onClick={() => setMost(works.list.length)}>
          Show {works.list.length - most} more
        </button>
      )}
      {mayRecord &&
        (writing ? (
          <WorkForm
            line={line}
            terminals={terminals}
            today={today}
            onSend={works.add}
            onClose={() => {
              recordButton.wanted();
              setWriting(false);
            }}
          />
        ) : (
          <button
            type="button"
            ref={recordButton.ref}
            className="button mt-2"
            onClick={() => setWriting(true)}
          >
            Record work
          </button>
        ))}
    </section>
  );
}

type WorkItemProps = Omit<RecordedWorksProps, 'works'> & { readonly work: Work; readonly works: Works };

function WorkItem({ work, works, line, terminals, site, nowMs, mayRecord }: WorkItemProps) {
  const [asking, setAsking] = useState(false);
  const withdrawButton = useFocusBack();
  const isStanding = work.withdrawn === null;
  return (
    <li className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 border-b border-hairline py-1.5">
      <p className="min-w-0 flex-1 basis-64 text-pretty wrap-anywhere">
        {isStanding ? (
          <a className="link" href={`/lines/${line.key}/compare?at=${work.doneOn}`}>
            {dayText(work.doneOn)}
          </a>
        ) : (
          <s className="text-ink-2">{dayText(work.doneOn)}</s>
        )}{' '}
        {isStanding ? work.what : <s className="text-ink-2">{work.what}</s>}
        <span className="block text-caption text-ink-2">
          {isStanding ? workWords(work, { terminals, site, nowMs }) : withdrawnWords(work, { site, nowMs })}
        </span>
      </p>
      {mayRecord && isStanding && !asking && (
        <button
          type="button"
          ref={withdrawButton.ref}
          className="link cursor-pointer"
          aria-label={`Withdraw: ${work.what}`}
          onClick={() => setAsking(true)}
        >
          Withdraw
        </button>
      )}
      {asking && isStanding && (
        <span className="flex flex-wrap items-baseline gap-2">
          Recorded in error?
          <button type="button" className="button" autoFocus onClick={() => void works.withdraw(work)}>
            Withdraw it
          </button>
          <button
            type="button"
            className="button"
            onClick={() => {
              withdrawButton.wanted();
              setAsking(false);
            }}
          >
            Keep it
          </button>
        </span>
      )}
    </li>
  );
}

/** Gives the keyboard back to a button that comes again, when that is wanted. */
function useFocusBack() {
  const wanted = useRef(false);
  return {
    wanted: () => {
      wanted.current = true;
    },
    ref: (button: HTMLButtonElement | null) => {
      if (!wanted.current || button === null) return;
      wanted.current = false;
      button.focus();
    },
  };
}
