import { CustomChart, LineChart, ScatterChart } from 'echarts/charts';
import { AriaComponent, GridComponent } from 'echarts/components';
import * as echarts from 'echarts/core';
import { CanvasRenderer } from 'echarts/renderers';

echarts.use([CustomChart, LineChart, ScatterChart, GridComponent, AriaComponent, CanvasRenderer]);

export { echarts };
