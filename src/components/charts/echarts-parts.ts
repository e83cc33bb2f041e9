import { CustomChart, LineChart, ScatterChart } from 'echarts/charts';
import { GridComponent, TooltipComponent } from 'echarts/components';
import * as echarts from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';

// Only what the charts draw with: the whole library is three times the size.
echarts.use([CustomChart, LineChart, ScatterChart, GridComponent, TooltipComponent, SVGRenderer]);

export { echarts };
