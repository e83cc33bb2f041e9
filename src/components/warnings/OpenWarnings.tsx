import type { Warning } from '../../contract/warning';
import type { BoardLine } from '../../view/board';
import { causeWords } from '../../view/cause-words';
import { instantText } from '../../view/figures';
import { openWarnings, stateWords, type OpenWarning } from '../../view/open-warnings';
import type { SiteCustom } from '../../view/site-custom';
import { ConditionMark } from '../marks/ConditionMark';
import { AcknowledgeButton } from './AcknowledgeButton';

interface OpenWarningsProps {
  lines: readonly BoardLine[];
  site: SiteCustom;
  nowMs: number;
  lost: boolean;
  mayAcknowledge: boolean;
  onAcknowledged: (warning: Warning) => void;
}

/** Every warning that is open, also one that has gone back to normal before anybody acknowledged it. */
export function OpenWarnings({ lines, ...shared }: OpenWarningsProps) {
  const open = openWarnings(lines.map(({ line }) => line));
  return (
    <section aria-labelledby="open-warnings" className="mt-8">
      <h2 id="open-warnings" className="mb-2 font-medium text-ink-2">
        {open.length === 0 ? 'No open warnings' : `Open warnings, ${open.length}`}
      </h2>
      {open.length > 0 && (
        <ul className="border-t border-hairline">
          {open.map((one) => (
            <WarningRow key={one.warning.id} one={one} {...shared} />
          ))}
        </ul>
      )}
    </section>
  );
}

function WarningRow({
  one,
  site,
  nowMs,
  lost,
  mayAcknowledge,
  onAcknowledged,
}: Omit<OpenWarningsProps, 'lines'> & { one: OpenWarning }) {
  const { warning, substations } = one;
  const words = causeWords(warning.cause, { site, nowMs, substations });
  const waits = warning.state === 'unacknowledged' || warning.state === 'returned to normal, unacknowledged';
  return (
    <li
      data-warning={warning.id}
      className="grid items-baseline gap-x-6 gap-y-0.5 border-b border-hairline py-1.5 md:grid-cols-[4.5rem_14rem_minmax(0,1fr)] lg:grid-cols-[4.5rem_14rem_minmax(0,1fr)_minmax(0,28rem)]"
    >
      <ConditionMark condition={warning.kind} faded={lost} className="justify-self-start" />
      <a href={`/lines/${warning.line}`} className="text-ink no-underline hover:underline">
        {warning.lineName}
      </a>
      <p className="max-w-[80ch] text-pretty">
        {words.lead}
        {words.rest}{' '}
        <span className="text-ink-2">
          Opened {instantText(warning.openedAt, nowMs, site.timeZone)}
          {warning.returnedAt === null
            ? ''
            : `, normal again ${instantText(warning.returnedAt, nowMs, site.timeZone)}`}
          .
        </span>
      </p>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 md:col-start-3 lg:col-start-4">
        <p className={waits ? 'font-medium' : 'line-clamp-3 text-ink-2'}>
          {stateWords(warning, nowMs, site)}
        </p>
        {waits && mayAcknowledge && <AcknowledgeButton warning={warning} onAcknowledged={onAcknowledged} />}
      </div>
    </li>
  );
}
