import { memo } from 'react';
import { bySubstation, type BoardLine } from '../../view/board';
import type { BoardQuery } from '../../view/board-query';
import { ageText, kilovoltsText, percentOfMarkText, percentText } from '../../view/figures';
import { worstUtilisation } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import { tareStrip } from '../../view/tare-strip';
import { StripKey } from '../marks/StripKey';
import { TareStrip } from '../marks/TareStrip';

interface SettledLinesProps {
  lines: readonly BoardLine[];
  group: BoardQuery['group'];
  site: SiteCustom;
  nowMs: number;
  lost: boolean;
}

/** What is calm gets little room: two columns, a bare strip and the worst phase's figure. */
export function SettledLines({ lines, group, site, nowMs, lost }: SettledLinesProps) {
  const rows = (some: readonly BoardLine[]) => (
    <ul className="grid gap-x-8 lg:grid-cols-2">
      {some.map((one) => (
        <SettledRow
          key={one.line.key}
          one={one}
          site={site}
          stale={lost || one.stale}
          age={lost || one.stale ? ageOf(one, nowMs) : undefined}
        />
      ))}
    </ul>
  );
  return (
    <section aria-labelledby="settled" className="mt-8">
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-8 gap-y-1 text-ink-2">
        <h2 id="settled" className="font-medium">
          Settled
        </h2>
        <StripKey site={site} />
        <p className="max-sm:hidden">worst phase, % of threshold</p>
      </div>
      {group === 'none'
        ? rows(lines)
        : bySubstation(lines).map((substation) => (
            <section key={substation.key} aria-label={substation.name} className="mt-4">
              <h3 className="border-b border-rule pb-1 font-medium">{substation.name}</h3>
              {rows(substation.lines)}
            </section>
          ))}
    </section>
  );
}

const ageOf = ({ line }: BoardLine, nowMs: number): string =>
  ageText(line.at === null ? undefined : Date.parse(line.at), nowMs);

interface SettledRowProps {
  one: BoardLine;
  site: SiteCustom;
  stale: boolean;
  /** written out only when the value is not live, so that a live row rests between values */
  age: string | undefined;
}

const SettledRow = memo(
  function SettledRow({ one: { line }, site, stale, age }: SettledRowProps) {
    return (
      <li
        data-line={line.key}
        className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 gap-y-1.5 border-b border-hairline py-2 sm:grid-cols-[11.5rem_minmax(0,1fr)_4.5rem]"
      >
        <div className="min-w-0">
          <a href={`/lines/${line.key}`} className="block text-ink no-underline hover:underline">
            {line.name}
          </a>
          <span className={`text-ink-2 ${stale ? 'italic' : ''}`}>
            {kilovoltsText(line.voltageKv)} ·{' '}
            {line.throughRatio === null ? 'load unknown' : percentText(line.throughRatio)}
            {line.throughRatio !== null && <span className="sr-only"> of rating</span>}
          </span>
        </div>
        <div className="max-sm:order-last max-sm:col-span-2">
          <TareStrip picture={tareStrip(line, site)} size="compact" stale={stale} />
        </div>
        <div className={`text-right ${stale ? 'text-ink-2' : ''}`}>
          <span className="live-value">{percentOfMarkText(worstUtilisation(line))}</span>
          <span className="sr-only"> of the threshold at the worst phase</span>
          {age !== undefined && <span className="block text-caption whitespace-nowrap italic">{age}</span>}
        </div>
      </li>
    );
  },
  (before, after) =>
    before.one.line === after.one.line &&
    before.site === after.site &&
    before.stale === after.stale &&
    before.age === after.age,
);
