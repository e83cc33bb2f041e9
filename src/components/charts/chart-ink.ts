/** The theme's tokens as a chart needs them: ECharts resolves no CSS variables. */
export interface ChartInk {
  readonly panel: string;
  readonly ink: string;
  readonly ink2: string;
  readonly hairline: string;
  readonly rule: string;
  readonly band: string;
  readonly rising: string;
  readonly near: string;
  readonly over: string;
  readonly accent: string;
}

const TOKENS: Record<keyof ChartInk, string> = {
  panel: '--panel',
  ink: '--ink',
  ink2: '--ink-2',
  hairline: '--hairline',
  rule: '--rule',
  band: '--band',
  rising: '--rising',
  near: '--near',
  over: '--over',
  accent: '--accent',
};

export function readChartInk(root: HTMLElement): ChartInk {
  const style = getComputedStyle(root);
  const read = (name: keyof ChartInk) => style.getPropertyValue(TOKENS[name]).trim();
  return {
    panel: read('panel'),
    ink: read('ink'),
    ink2: read('ink2'),
    hairline: read('hairline'),
    rule: read('rule'),
    band: read('band'),
    rising: read('rising'),
    near: read('near'),
    over: read('over'),
    accent: read('accent'),
  };
}
