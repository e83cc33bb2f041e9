import { useMemo } from 'react';
import { restraintConvention } from '../../protection/restraint';
import type { ThresholdCharacteristic } from '../../protection/characteristic';
import { phaseRows } from '../../view/line-phase-rows';
import type { PhaseName } from '../../view/phase';
import { planeShape } from '../../view/plane-shape';
import { planeSentence } from '../../view/plane-table';
import type { PlaneExtent, PlanePoint } from '../../view/plane-window';
import { cloudCells } from '../../view/review-cloud';
import type { CloudCell } from '../../view/review-cloud';
import type { worstLoadability } from '../../view/review-margins';
import type { ChartInk } from '../charts/chart-ink';
import { ChartPlace } from '../charts/ChartPlace';
import { useChartInk } from '../charts/use-chart-ink';
import { phaseColour } from '../line/phase-colour';
import { planeOption } from '../line/plane-option';
import type { PlanePanelProps } from './plane-panel-props';

interface Props extends PlanePanelProps {
  readonly characteristic: ThresholdCharacteristic;
  readonly extent: PlaneExtent;
  readonly shown: PhaseName | 'all';
  readonly worst: ReturnType<typeof worstLoadability>;
}

const NO_CELLS: readonly CloudCell[] = [];

/** Differential against restraint with the recorded threshold, the cloud, the live points and the path to emergency rating. */
export function RestraintPlane(props: Props) {
  const { line, site, cloud, shown } = props;
  const ink = useChartInk();
  const cells = useMemo(
    () => (cloud?.plane === 'restraint' ? cloudCells(cloud, shown) : NO_CELLS),
    [cloud, shown],
  );
  const option = useOption(props, cells, ink);
  return (
    <ChartPlace
      option={option}
      label={planeSentence(line, site.phaseLetters)}
      className="h-80 sm:h-[27rem]"
    />
  );
}

function useOption(props: Props, cells: readonly CloudCell[], ink: ChartInk | undefined) {
  const { line, inForce, characteristic, extent, site, faded, convention, worst } = props;
  return useMemo(() => {
    if (ink === undefined) return undefined;
    const predicted = predictedPoints(worst);
    const corners = cells.map(({ to }) => ({ restraintAmps: to.x, differentialAmps: to.y }));
    const also = extent === 'near the points' ? corners : [...corners, ...predicted];
    const shape = planeShape(line, { characteristic, readings: [], extent, unitAmps: 1, also });
    const rows = new Map(phaseRows(line, 'amperes', site).map((row) => [row.phase, row]));
    return planeOption({
      ...shape,
      ink,
      faded,
      points: shape.points.map((point) => {
        const row = rows.get(point.phase)!;
        return {
          ...point,
          letter: row.letter,
          colour: phaseColour(ink, row.condition, { faded }),
          lines: [
            `phase ${row.letter}`,
            `differential ${row.differential}`,
            `restraint ${row.restraint}`,
            `${row.utilisation} of the threshold, ${row.threshold}`,
            convention,
          ],
        };
      }),
      cloud: cells.map(({ from, to, density }) => ({ from: place(from), to: place(to), density })),
      path: {
        places: predicted.map(({ restraintAmps, differentialAmps }) => ({
          restraint: restraintAmps,
          differential: differentialAmps,
        })),
        label: 'emergency rating',
      },
      names: {
        differential: 'differential, A primary',
        restraint: `restraint, A primary (${restraintConvention(inForce.restraint)})`,
      },
    });
  }, [line, inForce, characteristic, extent, site, faded, convention, worst, cells, ink]);
}

function predictedPoints(worst: Props['worst']): PlanePoint[] {
  if (worst === undefined) return [];
  return worst.load.path.flatMap(({ restraintAmps, differentialAmps }) =>
    restraintAmps === undefined ? [] : [{ restraintAmps, differentialAmps }],
  );
}

const place = ({ x, y }: CloudCell['from']) => ({ restraint: x, differential: y });
