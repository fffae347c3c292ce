import ReactECharts from 'echarts-for-react/esm/core';
import type { EChartsCoreOption } from 'echarts/core';
import { echarts } from './echarts';

interface ChartCanvasProps {
  readonly option: EChartsCoreOption;
  readonly height: number;
}

/** The drawing itself, in the chunk that carries the chart library. */
export function ChartCanvas({ option, height }: ChartCanvasProps) {
  return <ReactECharts echarts={echarts} option={option} notMerge style={{ height }} />;
}
