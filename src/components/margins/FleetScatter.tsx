import { useCallback, useMemo } from 'react';
import { csvName } from '../../view/line-csv';
import { scatterPoints, scatterTable } from '../../view/margin-scatter';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { FetchState } from '../charts/FetchState';
import { useChartInk } from '../charts/use-chart-ink';
import { useNarrow } from '../line/use-narrow';
import { scatterOption } from './scatter-option';
import type { MarginAddressState } from './use-margin-address';
import { useScatter } from './use-margins';

interface FleetScatterProps {
  state: MarginAddressState;
  site: SiteCustom;
  nowMs: number;
}

const CHOICES = [
  { value: 'worst', label: 'Highest phase' },
  { value: 'all', label: 'All phases' },
] as const;

/** Where the fleet stands by its two great causes; each point opens its line. */
export function FleetScatter({ state, site, nowMs }: FleetScatterProps) {
  const which = state.address.points;
  const { scatter, error, tryAgain } = useScatter(state.address);
  const points = useMemo(
    () => (scatter === undefined ? undefined : scatterPoints(scatter, which)),
    [scatter, which],
  );
  const ink = useChartInk();
  const narrow = useNarrow();
  const option = useMemo(() => {
    if (ink === undefined || points === undefined) return undefined;
    const { nearRatio, phaseLetters: letters } = site;
    return scatterOption({ ink, points, nearRatio, letters, narrow });
  }, [ink, points, site, narrow]);
  const open = useCallback((key: string) => {
    if (key !== '') window.location.assign(`/lines/${key}`);
  }, []);
  return (
    <ChartPanel
      title="Charging against mismatch"
      caption="Each line as shares of its pickup, from the last 30 days; a point opens its line, and so does its name in the table"
      controls={
        <Choice
          legend="Points shown"
          name="points"
          value={which}
          options={CHOICES}
          onChoose={(value) => state.choose({ points: value })}
        />
      }
      table={
        points === undefined || points.length === 0 ? undefined : scatterTable(points, site.phaseLetters)
      }
      fileName={csvName(['fleet-causes'], nowMs)}
      timeZone={site.timeZone}
    >
      {points === undefined ? (
        <div className="h-80 py-6">
          <FetchState what="the fleet’s causes" error={error} onTryAgain={tryAgain} />
        </div>
      ) : points.length === 0 ? (
        <p className="py-6 text-ink-2">
          No phase here has its causes separated: that takes a week of snapshots with a load that goes up and
          down, and voltages in the feed.
        </p>
      ) : (
        <ChartPlace
          option={option}
          label={`Charging share against mismatch share of ${points.length} ${which === 'all' ? 'phases' : 'lines'}; the figures stand in the table.`}
          className="h-[26rem] max-w-[60rem]"
          onOpen={open}
        />
      )}
    </ChartPanel>
  );
}
