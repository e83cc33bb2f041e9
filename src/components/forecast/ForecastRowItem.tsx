import { useRef, useState } from 'react';
import type { Condition } from '../../contract/condition';
import { kilovoltsText } from '../../view/figures';
import { dayOf, forecastRange, type ForecastAxis } from '../../view/forecast-axis';
import {
  shortCauseName,
  dailyLevelsOf,
  shownDates,
  type ForecastPlace,
  type ForecastRow,
} from '../../view/forecast-list';
import type { SiteCustom } from '../../view/site-custom';
import { sparkline } from '../../view/sparkline';
import { FollowUpForm } from '../follow-ups/FollowUpForm';
import { FollowUpItem } from '../follow-ups/FollowUpItem';
import type { FollowUps } from '../follow-ups/use-follow-ups';
import { ConditionShape } from '../marks/ConditionMark';
import { PhaseSign } from '../marks/PhaseMarker';
import { Sparkline } from '../marks/Sparkline';
import { AxisLabels, RangeMark } from './RangeMark';

export interface ForecastRowProps {
  row: ForecastRow;
  axis: ForecastAxis;
  site: SiteCustom;
  nowMs: number;
  followUps: FollowUps;
  mayKeep: boolean;
}

/** The same columns for the rows and for the axis over them. */
export const ROW_GRID =
  'lg:grid-cols-[14rem_9rem_minmax(0,1fr)_24rem] xl:grid-cols-[16rem_11rem_minmax(0,1fr)_30rem]';

const MARKS: Readonly<
  Record<ForecastPlace, { condition: Condition; words: string; ink: string; block: string }>
> = {
  beyond: {
    condition: 'near',
    words: 'beyond the near mark',
    ink: 'text-near',
    block: 'panel border-l-4 border-l-near px-4 py-3.5',
  },
  coming: {
    condition: 'rising',
    words: 'rising',
    ink: 'text-rising',
    block: 'panel border-l-4 border-l-rising px-4 py-3.5',
  },
  'within margin': {
    condition: 'settled',
    words: 'rising within margin',
    ink: 'text-ink-2',
    // what asks for nothing gets little
    block: 'border-b border-hairline pt-1 pb-2.5 lg:pr-4 lg:pl-5',
  },
};

/** A line with its history in small, the range of its date, the words for it, and what is to be done. */
export function ForecastRowItem({ row, axis, site, nowMs, followUps, mayKeep }: ForecastRowProps) {
  const { line, phase, place } = row;
  const { verdict } = phase;
  const mark = MARKS[place];
  const { words } = phase;
  const nearAmps = verdict.pickupAmps === null ? undefined : site.nearRatio * verdict.pickupAmps;
  const range = forecastRange(shownDates(row), axis);
  return (
    <li data-line={line.key} className={`grid items-start gap-x-7 gap-y-3 ${mark.block} ${ROW_GRID}`}>
      <div>
        <h3 className={place === 'within margin' ? 'font-medium' : 'text-lead leading-snug font-semibold'}>
          <a href={`/lines/${line.key}`} className="text-ink no-underline hover:underline">
            {line.name}
          </a>
        </h3>
        <p className="flex flex-wrap items-center gap-x-1.5 text-ink-2">
          {kilovoltsText(line.voltageKv)} ·
          <span className="inline-flex items-center gap-1">
            <PhaseSign phase={verdict.phase} size={3.2} /> phase {site.phaseLetters[verdict.phase]}
          </span>
          · {shortCauseName(verdict.likelyCause)}
        </p>
        {place !== 'within margin' && (
          <p className={`mt-1 inline-flex items-center gap-1.5 font-semibold ${mark.ink}`}>
            <ConditionShape condition={mark.condition} />
            {mark.words}
          </p>
        )}
      </div>
      <Sparkline picture={sparkline(dailyLevelsOf(phase), nearAmps)} condition={mark.condition} />
      <div className="lg:pt-2.5">
        {range === undefined ? (
          <p className="text-caption text-ink-2">
            {phase.creepVerdict === null ? 'no rise to project' : 'not within five years'}
          </p>
        ) : (
          <>
            <RangeMark axis={axis} range={range} label={words.when} />
            <AxisLabels axis={axis} className="lg:hidden" />
          </>
        )}
      </div>
      <div className="min-w-0">
        <p className="max-w-[64ch] text-pretty">
          <strong className="font-semibold">{words.lead}</strong> {words.when}
          {words.why !== '' && <span className="text-ink-2"> {words.why}</span>}
        </p>
        {row.others.length > 0 && <Others row={row} />}
        <LineFollowUps {...{ row, site, nowMs, followUps, mayKeep }} />
      </div>
    </li>
  );
}

function Others({ row }: { row: ForecastRow }) {
  return (
    <p className="mt-1 max-w-[64ch] text-pretty text-ink-2">
      As well: {row.others.map(({ words: { lead, when } }) => `${lead} ${when}`).join(' ')}
    </p>
  );
}

function LineFollowUps({ row, site, nowMs, followUps, mayKeep }: Omit<ForecastRowProps, 'axis'>) {
  const [writing, setWriting] = useState(false);
  const closed = useRef(false);
  const { line, phase, place } = row;
  const own = followUps.open.filter((one) => one.line === line.key);
  return (
    <>
      {own.length > 0 && (
        <ul
          aria-label={`Follow-ups for ${line.name}`}
          className="mt-2 grid gap-1.5 border-l-2 border-rule pl-3"
        >
          {own.map((followUp) => (
            <li key={followUp.id}>
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
      {writing ? (
        <FollowUpForm
          line={line}
          phase={phase.verdict.phase}
          cause={phase.verdict.likelyCause}
          today={dayOf(nowMs)}
          onSend={followUps.add}
          onClose={() => {
            closed.current = true;
            setWriting(false);
          }}
        />
      ) : (
        mayKeep && (
          <button
            type="button"
            ref={(button) => {
              if (!closed.current || button === null) return;
              closed.current = false;
              button.focus();
            }}
            className={`mt-2 ${place === 'within margin' ? 'link cursor-pointer' : 'button'}`}
            aria-label={`Open a follow-up for ${line.name}`}
            onClick={() => setWriting(true)}
          >
            Open a follow-up
          </button>
        )
      )}
    </>
  );
}
