import EChartsReactCore from 'echarts-for-react/esm/core';
import type { EChartsCoreOption } from 'echarts/core';
import { useMemo } from 'react';
import { echarts } from './echarts-parts';

interface Props {
  readonly option: EChartsCoreOption;
  /** what the chart shows, for whoever doesn't see it; the figures stand in the table behind it */
  readonly label: string;
  /** called with the name of the datum that was clicked; the same function while nothing of it changes */
  readonly onOpen?: (name: string) => void;
}

const SVG = { renderer: 'svg' } as const;
/** A series that is gone must go; axes and an open tooltip stay. */
const REPLACED = ['series'];
const FULL = { height: '100%', width: '100%' } as const;

/** One ECharts drawing, as SVG, filling its place. Loaded in the browser only. */
export default function Chart({ option, label, onOpen }: Props) {
  const onEvents = useMemo(
    () => (onOpen === undefined ? {} : { click: ({ name }: { name: string }) => onOpen(name) }),
    [onOpen],
  );
  return (
    <div role="img" aria-label={label} className="h-full">
      <EChartsReactCore
        echarts={echarts}
        option={option}
        opts={SVG}
        replaceMerge={REPLACED}
        style={FULL}
        onEvents={onEvents}
      />
    </div>
  );
}
