import { useState } from 'react';
import { isThresholdCharacteristic } from '../../protection/characteristic';
import { csvName } from '../../view/line-csv';
import { missingFiguresReason } from '../../view/line-phase-rows';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { PlaneExtent } from '../../view/plane-window';
import { cloudWords } from '../../view/review-cloud';
import { worstLoadability } from '../../view/review-margins';
import { periodWords } from '../../view/review-period';
import { cloudTable } from '../../view/review-tables';
import { ChartPanel } from '../charts/ChartPanel';
import { Choice } from '../charts/Choice';
import { FetchState } from '../charts/FetchState';
import { RegionPlane } from './RegionPlane';
import { RestraintPlane } from './RestraintPlane';
import type { PlanePanelProps } from './plane-panel-props';

const TITLES = {
  'two-slope': 'Differential against restraint',
  adaptive: 'Differential against restraint',
  'alpha-plane': 'Alpha plane',
  'phase-comparison': 'Phase sector',
} as const;

/** The plane that fits the scheme: where the line stands now, where it has stood, and where load would take it. */
export function PlanePanel(props: PlanePanelProps) {
  const { line, inForce, site, nowMs, convention, period, cloud, cloudError, onTryAgain, load } = props;
  const { kind } = inForce.characteristic;
  const [extent, setExtent] = useState<PlaneExtent>('whole characteristic');
  const [shown, setShown] = useState<PhaseName | 'all'>('all');
  const worst = worstLoadability(load);
  const phases = [
    { value: 'all' as const, label: 'All' },
    ...PHASES.map((value) => ({ value, label: site.phaseLetters[value] })),
  ];
  const drawn = { ...props, extent, shown, worst };
  const missing = missingFiguresReason(line);
  return (
    <ChartPanel
      title={TITLES[kind]}
      caption={
        cloud === undefined
          ? 'Counting where the snapshots lay'
          : cloudWords(cloud, periodWords(period, site.timeZone))
      }
      controls={
        <>
          <Choice
            legend="Phase shaded"
            name="cloud-phase"
            value={shown}
            options={phases}
            onChoose={setShown}
          />
          <Choice
            legend="How much of the plane is shown"
            name="review-extent"
            value={extent}
            options={[
              { value: 'whole characteristic', label: 'Whole' },
              { value: 'near the points', label: 'Near the points' },
            ]}
            onChoose={setExtent}
          />
        </>
      }
      table={cloud === undefined ? undefined : cloudTable(cloud, { letters: site.phaseLetters, convention })}
      fileName={csvName([line.key, 'review', kind], nowMs)}
      timeZone={site.timeZone}
    >
      <div className="grid min-w-0 content-start gap-2" title={convention}>
        {isThresholdCharacteristic(inForce.characteristic) ? (
          <RestraintPlane {...drawn} characteristic={inForce.characteristic} />
        ) : (
          <RegionPlane {...drawn} characteristic={inForce.characteristic} />
        )}
        {cloud === undefined && (
          <FetchState
            what={`the cloud of ${periodWords(period, site.timeZone)}`}
            error={cloudError}
            onTryAgain={onTryAgain}
          />
        )}
        {missing !== undefined && <p className="text-ink-2">No operating point now: {missing}</p>}
        {worst !== undefined && (
          <p className="text-caption text-ink-2">
            Dashed: predicted from no load to emergency rating, phase {site.phaseLetters[worst.phase]}, each
            step at its worst angle. {worst.load.words}
          </p>
        )}
      </div>
    </ChartPanel>
  );
}
