import ReactEChartsCore from 'echarts-for-react/esm/core';
import type { EChartsOption } from 'echarts';
import { BarChart, CustomChart, LineChart, ScatterChart } from 'echarts/charts';
import {
  GridComponent,
  MarkAreaComponent,
  MarkLineComponent,
  TooltipComponent,
} from 'echarts/components';
import * as echarts from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';

echarts.use([
  BarChart,
  CustomChart,
  LineChart,
  ScatterChart,
  GridComponent,
  MarkAreaComponent,
  MarkLineComponent,
  TooltipComponent,
  SVGRenderer,
]);

interface EChartProps {
  readonly option: EChartsOption;
  readonly height: number;
}

/** The drawing itself, in a chunk of its own. */
export function EChart({ option, height }: EChartProps) {
  return (
    <ReactEChartsCore
      echarts={echarts}
      option={option}
      notMerge
      opts={{ renderer: 'svg' }}
      style={{ height, width: '100%' }}
    />
  );
}
