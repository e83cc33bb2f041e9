import { memo } from 'react';
import type { Condition } from '../../contract/condition';
import type { Warning } from '../../contract/warning';
import type { BoardLine } from '../../view/board';
import { lineReason } from '../../view/cause-words';
import { ageText } from '../../view/figures';
import { lineWords } from '../../view/line-words';
import type { SiteCustom } from '../../view/site-custom';
import { sparkline } from '../../view/sparkline';
import { tareStrip } from '../../view/tare-strip';
import { ConditionMark } from '../marks/ConditionMark';
import { Sparkline } from '../marks/Sparkline';
import { TareStrip } from '../marks/TareStrip';
import { WarningAct } from '../warnings/WarningAct';

export interface AttentionRowProps {
  one: BoardLine;
  site: SiteCustom;
  /** site time, ms, for ages and lasting; moves on each second */
  nowMs: number;
  /** site time for which everything told is known, ms: now, or the last that was heard when the stream is lost */
  asOfMs: number;
  lost: boolean;
  mayAcknowledge: boolean;
  onAcknowledged: (warning: Warning) => void;
}

const EDGE: Readonly<Partial<Record<Condition, string>>> = {
  over: 'border-l-over',
  near: 'border-l-near',
  rising: 'border-l-rising',
  blind: 'border-l-blind',
};

/** A line that is not settled, with room for what it shows, why, and what to do next. */
export const AttentionRow = memo(function AttentionRow(props: AttentionRowProps) {
  const { one, site, nowMs, asOfMs, lost, mayAcknowledge, onAcknowledged } = props;
  const { line } = one;
  const stale = lost || one.stale;
  const knownAtMs = one.stale && line.at !== null ? Date.parse(line.at) : asOfMs;
  const reason = lineReason(line, { site, nowMs: knownAtMs, substations: line.substations });
  const nearAmps = line.pickupAmps === null ? undefined : site.nearRatio * line.pickupAmps;
  return (
    <li
      data-line={line.key}
      className={`panel border-l-4 ${stale ? 'border-l-rule' : EDGE[line.condition]} grid items-center gap-x-8 gap-y-3 px-4 py-3.5 md:grid-cols-[16rem_minmax(0,1fr)] lg:grid-cols-[15rem_minmax(0,1fr)_9rem_17rem] xl:grid-cols-[16rem_minmax(0,1fr)_11.5rem_20rem]`}
    >
      <div>
        <h3 className="text-lead leading-snug font-semibold">
          <a href={`/lines/${line.key}`} className="text-ink no-underline hover:underline">
            {line.name}
          </a>
        </h3>
        <p className={`text-pretty text-ink-2 ${stale ? 'italic' : ''}`}>{lineWords(line)}</p>
        <ConditionMark
          condition={line.condition}
          age={stale && line.at !== null ? ageText(Date.parse(line.at), nowMs) : undefined}
          className="mt-1"
        />
      </div>
      <TareStrip picture={tareStrip(line, site)} stale={stale} />
      <Sparkline picture={sparkline(line.dailyLevels, nearAmps)} condition={line.condition} faded={stale} />
      <div>
        <p className={`max-w-[60ch] text-pretty ${stale ? 'text-ink-2' : ''}`}>
          <strong className="font-semibold">{reason.lead}</strong>
          {reason.rest}
        </p>
        <WarningAct
          warnings={line.warnings}
          lineKey={line.key}
          site={site}
          nowMs={nowMs}
          mayAcknowledge={mayAcknowledge}
          onAcknowledged={onAcknowledged}
        />
      </div>
    </li>
  );
});
