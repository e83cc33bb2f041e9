import { Fragment } from 'react';
import type { LineSummary } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import type { NotComputable } from '../../protection/evaluation';
import type { Sensitivity } from '../../protection/sensitivity';
import { ampsText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { PHASES } from '../../view/phase';
import { sensitivityTable } from '../../view/review-tables';
import { ohmsText } from '../../view/review-words';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { Assumptions } from './Assumptions';
import type { ReviewFigures } from './use-review';

interface Props {
  readonly line: LineSummary;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly convention: string;
  readonly seen: ReviewFigures['seen'];
}

const ASSUMPTIONS = [
  'Fault current adds to the currents before it, at the worst angle to them and, fed from one end, at the worst end; that a fault draws load and voltage down is left out.',
  'Fault resistance: nominal voltage to earth over that current, without impedance of sources and line. Looked for up to 63 kA.',
];

/** The smallest fault inside the zone that the present threshold sees, and the resistance it may have. */
export function SensitivityPanel({ line, site, nowMs, convention, seen }: Props) {
  const letters = site.phaseLetters;
  return (
    <ChartPanel
      title="Sensitivity"
      caption="Smallest internal fault that is seen, A primary, and the fault resistance at nominal voltage"
      table={sensitivityTable(seen, { letters, convention })}
      fileName={csvName([line.key, 'sensitivity'], nowMs)}
      timeZone={site.timeZone}
    >
      <div className="min-w-0" title={convention}>
        <table className="figures">
          <thead>
            <tr>
              <th scope="col">fed from</th>
              <th scope="col">over</th>
              <th scope="col" className="figure">
                fault current
              </th>
              <th scope="col" className="figure">
                resistance
              </th>
            </tr>
          </thead>
          <tbody>
            {seen.map(({ fedFrom, figures }) => (
              <Fragment key={fedFrom}>
                <Row names={[fedFrom, 'no load']} found={figures.noLoad} />
                {loadRows(figures.presentLoad).map(({ phases, found }) => (
                  <Row
                    key={phases.join('')}
                    names={['', `present load, ${phases.map((phase) => letters[phase]).join(' ')}`]}
                    found={found}
                  />
                ))}
              </Fragment>
            ))}
          </tbody>
        </table>
        <Assumptions sentences={ASSUMPTIONS} />
      </div>
    </ChartPanel>
  );
}

type Found = Sensitivity | NotComputable;

/** One row a phase, or one for all where none can be told for the same reason. */
function loadRows(found: ReviewFigures['seen'][number]['figures']['presentLoad']) {
  const reasons = PHASES.map((phase) =>
    isComputable(found[phase]) ? undefined : found[phase].notComputable,
  );
  if (reasons[0] !== undefined && reasons.every((reason) => reason === reasons[0])) {
    return [{ phases: PHASES, found: found.a }];
  }
  return PHASES.map((phase) => ({ phases: [phase], found: found[phase] }));
}

function Row({ names, found }: { names: readonly [string, string]; found: Found }) {
  return (
    <tr>
      <td className="whitespace-nowrap">{names[0]}</td>
      <td>{names[1]}</td>
      {isComputable(found) ? (
        <>
          <td className="figure">
            {found.faultAmps === undefined ? '> 63\u00a0kA' : ampsText(found.faultAmps)}
          </td>
          <td className="figure">{ohmsText(found.faultResistanceOhm)}</td>
        </>
      ) : (
        <td colSpan={2} className="text-ink-2">
          {found.notComputable}
        </td>
      )}
    </tr>
  );
}
