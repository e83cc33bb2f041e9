import { lazy, Suspense } from 'react';
import type { EChartsCoreOption } from 'echarts/core';

interface Props {
  /** undefined until the theme's colours are known, which is in the browser */
  readonly option: EChartsCoreOption | undefined;
  readonly label: string;
  /** keeps the room, so that nothing jumps when the drawing comes */
  readonly className: string;
  readonly onOpen?: (name: string) => void;
}

// A chunk of its own: the page stands and can be read before the charts have come.
const Chart = lazy(() => import('./Chart'));

/** The room of a chart, and the chart in it as soon as it can be drawn. */
export function ChartPlace({ option, label, className, onOpen }: Props) {
  return (
    <div className={`min-w-0 ${className}`}>
      {option !== undefined && (
        <Suspense fallback={null}>
          <Chart option={option} label={label} {...(onOpen === undefined ? {} : { onOpen })} />
        </Suspense>
      )}
    </div>
  );
}
