import ReactEChartsCore from 'echarts-for-react/esm/core';
import { CustomChart } from 'echarts/charts';
import { GridComponent } from 'echarts/components';
import * as echarts from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';

// SVG prints sharp and takes the page's own fonts as they arrive
echarts.use([CustomChart, GridComponent, SVGRenderer]);

interface EChartProps {
  readonly option: echarts.EChartsCoreOption;
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
