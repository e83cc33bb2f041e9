import type { ChartInk } from './chart-ink';

/** What every chart here shares: the type, hairlines across, no decoration, no movement. */
export const CHART_TYPE = { fontFamily: 'Barlow, sans-serif', fontSize: 12 } as const;

export const chartBase = (ink: ChartInk) => ({
  animation: false,
  textStyle: { ...CHART_TYPE, color: ink.ink2 },
});

/** As figures are written on the rest of the page: thousands ungrouped, no rounding dust. */
const plainFigure = (value: number): string => String(Number(value.toPrecision(6)));

export const axisBase = (ink: ChartInk) => ({
  type: 'value' as const,
  min: 0,
  axisLine: { show: false },
  axisTick: { show: false },
  axisLabel: { ...CHART_TYPE, color: ink.ink2, formatter: plainFigure },
  splitLine: { show: true, lineStyle: { color: ink.hairline, width: 1 } },
  nameTextStyle: { ...CHART_TYPE, color: ink.ink2 },
});

/** Plain box, hairline, no shadow; what stands in it is built as elements, never as markup. */
export const tooltipBase = (ink: ChartInk) => ({
  backgroundColor: ink.panel,
  borderColor: ink.rule,
  borderWidth: 1,
  padding: [6, 10],
  extraCssText: 'box-shadow:none;border-radius:0;',
  textStyle: { ...CHART_TYPE, color: ink.ink },
  confine: true,
  transitionDuration: 0,
});

/** Lines of text as elements: a page's security policy lets no chart write markup with styles. */
export function tooltipLines(lines: readonly string[]): HTMLElement {
  const box = document.createElement('div');
  lines.forEach((line, index) => {
    const row = document.createElement('div');
    row.textContent = line;
    if (index === 0) row.className = 'text-ink-2';
    box.append(row);
  });
  return box;
}

/** Light diagonal hatching, drawn as a repeating tile. */
export function hatching(color: string) {
  return {
    type: 'pattern' as const,
    svgElement: {
      tag: 'path',
      key: 'hatch',
      attrs: { d: 'M-1 1 1 -1 M0 8 8 0 M7 9 9 7', stroke: color, 'stroke-width': 1, fill: 'none' },
    },
    svgWidth: 8,
    svgHeight: 8,
    x: 0,
    y: 0,
    rotation: 0,
    scaleX: 1,
    scaleY: 1,
    repeat: 'repeat' as const,
  };
}
