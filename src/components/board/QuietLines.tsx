import type { BoardLine } from '../../view/board';
import { lineReason } from '../../view/cause-words';
import { kilovoltsText } from '../../view/figures';
import { buildWords } from '../../view/line-words';
import type { SiteCustom } from '../../view/site-custom';
import { ConditionMark } from '../marks/ConditionMark';

interface QuietLinesProps {
  lines: readonly BoardLine[];
  site: SiteCustom;
  nowMs: number;
}

/** Lines of which nothing is claimed: quiet, and apart from what is settled. */
export function QuietLines({ lines, site, nowMs }: QuietLinesProps) {
  return (
    <section aria-labelledby="not-judged" className="mt-8">
      <h2 id="not-judged" className="mb-2 font-medium text-ink-2">
        Not judged
      </h2>
      <ul className="border-t border-hairline">
        {lines.map(({ line }) => {
          const reason = lineReason(line, { site, nowMs, substations: line.substations });
          return (
            <li
              key={line.key}
              data-line={line.key}
              className="grid gap-x-8 gap-y-0.5 border-b border-hairline py-2 md:grid-cols-[20rem_9rem_minmax(0,1fr)]"
            >
              <div>
                <a href={`/lines/${line.key}`} className="block text-ink no-underline hover:underline">
                  {line.name}
                </a>
                <span className="text-ink-2">
                  {kilovoltsText(line.voltageKv)} · {buildWords(line)}
                </span>
              </div>
              <ConditionMark condition={line.condition} className="self-start" />
              <p className="max-w-[70ch] text-ink-2">{reason.rest}</p>
            </li>
          );
        })}
      </ul>
    </section>
  );
}
