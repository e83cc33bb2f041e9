import { useMemo, useState } from 'react';
import type { LineSummary } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import { isThresholdCharacteristic } from '../../protection/characteristic';
import type { ThresholdCharacteristic } from '../../protection/characteristic';
import { isComputable } from '../../protection/evaluation';
import type { NotComputable } from '../../protection/evaluation';
import { restraintConvention } from '../../protection/restraint';
import type { Reading } from '../../view/line-readings';
import { missingFiguresReason, phaseRows } from '../../view/line-phase-rows';
import { characteristicName } from '../../view/line-settings-rows';
import { unitWords } from '../../view/line-unit';
import type { CurrentUnit } from '../../view/line-unit';
import { csvName } from '../../view/line-csv';
import { planeShape } from '../../view/plane-shape';
import { planeSentence, planeTable } from '../../view/plane-table';
import type { PlaneExtent } from '../../view/plane-window';
import { conventionWords } from '../../view/review-words';
import type { SiteCustom } from '../../view/site-custom';
import type { ChartInk } from '../charts/chart-ink';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { useChartInk } from '../charts/use-chart-ink';
import { RegionPlane } from '../review/RegionPlane';
import type { LiveSnapshot } from '../review/use-live-snapshot';
import { phaseColour } from './phase-colour';
import { planeOption } from './plane-option';

interface Props {
  readonly line: LineSummary;
  readonly inForce: SettingsVersion | undefined;
  /** the last ten minutes */
  readonly readings: readonly Reading[];
  /** why the tails are not there; null while they are or are coming */
  readonly tailError: Error | null;
  readonly unit: CurrentUnit;
  readonly site: SiteCustom;
  readonly faded: boolean;
  readonly nowMs: number;
  /** the newest snapshot as the scheme sees it */
  readonly live: LiveSnapshot | NotComputable | undefined;
}

const EXTENTS: readonly { value: PlaneExtent; label: string }[] = [
  { value: 'near the points', label: 'Near the points' },
  { value: 'whole characteristic', label: 'Whole characteristic' },
];

/** Differential against restraint, with the recorded threshold and the way of the last ten minutes. */
export function OperatingPlane(props: Props) {
  const { inForce } = props;
  if (inForce !== undefined && !isThresholdCharacteristic(inForce.characteristic)) {
    return <OwnPlane {...props} inForce={inForce} characteristic={inForce.characteristic} />;
  }
  return <ThresholdPlane {...props} />;
}

type Region = Exclude<SettingsVersion['characteristic'], ThresholdCharacteristic>;

/** A scheme that weighs no differential against a restraint has a plane of its own; the cloud over it is on the Review page. */
function OwnPlane({
  characteristic,
  ...props
}: Props & { inForce: SettingsVersion; characteristic: Region }) {
  const { line, inForce, live } = props;
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="plane-title">
      <h2 id="plane-title" className="m-0 text-body font-semibold">
        Operating point
      </h2>
      <p className="mt-0.5 text-caption text-ink-2">
        {missingFiguresReason(line) ?? `Now, by ${characteristicName(characteristic.kind)}`}
      </p>
      {live !== undefined && !isComputable(live) && <p className="mt-2 text-ink-2">{live.notComputable}</p>}
      <RegionPlane
        {...props}
        characteristic={characteristic}
        convention={conventionWords(inForce)}
        cloud={undefined}
        extent="whole characteristic"
        shown="all"
        worst={undefined}
      />
      <p className="mt-2">
        <a className="link" href={`/lines/${line.key}/review`}>
          Where it has stood, and where load would take it
        </a>
      </p>
    </section>
  );
}

function ThresholdPlane(props: Props) {
  const { line, inForce, readings, unit, site, nowMs } = props;
  const [extent, setExtent] = useState<PlaneExtent>('near the points');
  const ink = useChartInk();
  const option = usePlaneOption(props, extent, ink);
  const table = useMemo(
    () => planeTable(readings, { letters: site.phaseLetters, unit, ratingAmps: line.ratingAmps }),
    [readings, site, unit, line.ratingAmps],
  );
  return (
    <ChartPanel
      title="Operating point"
      caption={inForce === undefined ? 'No threshold to draw' : planeCaption(props)}
      controls={
        inForce !== undefined && (
          <Choice
            legend="How much of the plane is shown"
            name="plane-extent"
            value={extent}
            options={EXTENTS}
            onChoose={setExtent}
          />
        )
      }
      table={table.rows.length === 0 || inForce === undefined ? undefined : table}
      fileName={csvName([line.key, 'operating points'], nowMs)}
      timeZone={site.timeZone}
    >
      {inForce === undefined ? (
        <p className="py-6 text-ink-2">
          No settings are recorded for this line, so there is no threshold to stand against. Once a version is
          in the register, the plane is drawn here.
        </p>
      ) : (
        <ChartPlace
          option={option}
          label={planeSentence(line, site.phaseLetters)}
          className="h-80 sm:h-full sm:min-h-[25.5rem]"
        />
      )}
    </ChartPanel>
  );
}

function planeCaption({ line, tailError, faded }: Props): string {
  const missing = missingFiguresReason(line);
  if (missing !== undefined) return `No operating point now: ${missing}`;
  if (faded) return 'Last known, not live, and the ten minutes before';
  return tailError === null ? 'Now, and the last ten minutes' : `Now only. ${tailError.message}`;
}

function usePlaneOption(
  { line, inForce, readings, unit, site, faded }: Props,
  extent: PlaneExtent,
  ink: ChartInk | undefined,
) {
  return useMemo(() => {
    if (ink === undefined || inForce === undefined) return undefined;
    const { characteristic, restraint } = inForce;
    if (!isThresholdCharacteristic(characteristic)) return undefined;
    const unitAmps = unit === 'amperes' ? 1 : line.ratingAmps;
    const shape = planeShape(line, { characteristic, readings, extent, unitAmps });
    const rows = new Map(phaseRows(line, unit, site).map((row) => [row.phase, row]));
    const points = shape.points.map((point) => {
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
        ],
      };
    });
    const words = unitWords(unit, line.ratingAmps);
    return planeOption({
      ...shape,
      ink,
      points,
      faded,
      names: {
        differential: `differential, ${words}`,
        restraint: `restraint, ${words} (${restraintConvention(restraint)})`,
      },
    });
  }, [line, inForce, readings, unit, site, faded, extent, ink]);
}
