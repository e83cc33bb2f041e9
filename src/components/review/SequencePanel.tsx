import type { LineSummary } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import type { NotComputable } from '../../protection/evaluation';
import { ampsText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { DASH } from '../../view/line-figures';
import { sequenceTable } from '../../view/review-tables';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import type { LiveSnapshot } from './use-live-snapshot';

interface Props {
  readonly line: LineSummary;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly faded: boolean;
  readonly convention: string;
  readonly live: LiveSnapshot | NotComputable | undefined;
}

const SEQUENCES = ['zero', 'positive', 'negative'] as const;

/** Zero-, positive- and negative-sequence differential of the newest snapshot. */
export function SequencePanel({ line, site, nowMs, faded, convention, live }: Props) {
  const told = live !== undefined && isComputable(live);
  return (
    <ChartPanel
      title="Sequence differentials"
      caption={`${faded ? 'Last known, not live' : 'Now'}; symmetrical components, referred to phase ${site.phaseLetters.a}, A primary`}
      table={told ? sequenceTable(live.sequences, convention) : undefined}
      fileName={csvName([line.key, 'sequences'], nowMs)}
      timeZone={site.timeZone}
    >
      {told ? (
        <table className="figures" title={convention}>
          <thead>
            <tr>
              <th scope="col">sequence</th>
              <th scope="col" className="figure">
                differential
              </th>
              <th scope="col" className="figure">
                restraint
              </th>
            </tr>
          </thead>
          <tbody>
            {SEQUENCES.map((sequence) => {
              const { differentialAmps, restraintAmps } = live.sequences[sequence];
              const ink = `figure live-value ${faded ? 'text-ink-2' : ''}`;
              return (
                <tr key={sequence}>
                  <th scope="row">{sequence}</th>
                  <td className={ink}>{ampsText(differentialAmps)}</td>
                  <td className={ink}>{restraintAmps === undefined ? DASH : ampsText(restraintAmps)}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      ) : (
        <p className="py-2 text-ink-2">{live?.notComputable ?? 'Nothing has been heard of this line yet.'}</p>
      )}
    </ChartPanel>
  );
}
