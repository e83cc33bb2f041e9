import { useMemo, useState } from 'react';
import type { ReplayResult } from '../../contract/replay';
import { csvName } from '../../view/line-csv';
import { distributionTable } from '../../view/replay-distribution';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { useChartInk } from '../charts/use-chart-ink';
import { distributionOption, type DistributionForm } from './distribution-option';
import { useNarrow } from './use-narrow';

interface Props {
  readonly result: ReplayResult;
  readonly site: SiteCustom;
  readonly nowMs: number;
}

const FORMS: readonly { value: DistributionForm; label: string }[] = [
  { value: 'at or above', label: 'At or above' },
  { value: 'histogram', label: 'Histogram' },
];
const CAPTIONS: Readonly<Record<DistributionForm, string>> = {
  'at or above':
    'Share of the evaluated snapshots at or above each utilisation, on a logarithmic scale; solid these settings, dashed the recorded; dotted the near mark, heavy 100 %',
  histogram: 'Share of the evaluated snapshots by utilisation; solid these settings, dashed the recorded',
};

/** How often each phase stood where, on both sides. */
export function DistributionPanel({ result, site, nowMs }: Props) {
  const [form, setForm] = useState<DistributionForm>('at or above');
  const ink = useChartInk();
  const narrow = useNarrow();
  const { distribution, nearRatio } = result;
  const { phaseLetters: letters } = site;
  const option = useMemo(
    () => ink && distributionOption({ ink, distribution, nearRatio, letters, form, narrow }),
    [ink, distribution, nearRatio, letters, form, narrow],
  );
  const table = useMemo(() => distributionTable(distribution, letters), [distribution, letters]);
  return (
    <ChartPanel
      title="Distribution of utilisation"
      caption={CAPTIONS[form]}
      controls={
        <Choice legend="Form of the chart" name="form" value={form} options={FORMS} onChoose={setForm} />
      }
      table={table.rows.length === 0 ? undefined : table}
      fileName={csvName([result.line, 'replay'], nowMs)}
      timeZone={site.timeZone}
    >
      <ChartPlace
        option={option}
        label={`Distribution of utilisation for each phase. ${CAPTIONS[form]}.`}
        className={narrow ? 'h-[38rem]' : 'h-72'}
      />
    </ChartPanel>
  );
}
