import * as echarts from 'echarts/core';
import { CustomChart } from 'echarts/charts';
import { GridComponent } from 'echarts/components';
import { SVGRenderer } from 'echarts/renderers';
import { describe, expect, it } from 'vitest';
import type { EChartsCoreOption } from 'echarts/core';
import { influenceOption } from '@/charts/influenceOption';
import { contourMapOption } from '@/charts/map/contourMapOption';
import { residualOption } from '@/charts/residualOption';
import { sectionOption } from '@/charts/sectionOption';
import { sieveCurveOption } from '@/charts/sieveCurveOption';
import { spreadCurveOption } from '@/charts/spreadCurveOption';
import { CHART_TOKENS, type ChartTokens } from '@/charts/tokens';
import { tradeOffOption } from '@/charts/tradeOffOption';
import {
  AGAINST_NORMAL,
  INFLUENCE,
  NORMAL_BAND,
  SECTION,
  SIEVE_CURVE,
  SPREADS,
  TRADE_OFF,
} from './sampleCharts';
import { SAMPLE_MAP } from './sampleMap';

echarts.use([CustomChart, GridComponent, SVGRenderer]);

/** Each token its own colour, so that a drawing can be asked what it wears. */
const tokens = Object.fromEntries(
  CHART_TOKENS.map((name, k) => [name, `#0000${(k + 16).toString(16)}`]),
) as ChartTokens;
const size = { width: 800, height: 420 };

/** The picture of the last of some options that one chart shows after each other. */
function svgOf(...options: readonly EChartsCoreOption[]): string {
  const chart = echarts.init(null, null, { renderer: 'svg', ssr: true, ...size });
  for (const option of options) {
    chart.setOption(option, { notMerge: true });
    chart.renderToSVGString();
  }
  const svg = chart.renderToSVGString();
  chart.dispose();
  return svg;
}

// ids and classes are numbered through all charts of a process
const plain = (svg: string) => svg.replace(/zr\d+[-\w]*|cls-\d+/g, '');

const OPTIONS: Readonly<Record<string, () => EChartsCoreOption>> = {
  map: () => contourMapOption(SAMPLE_MAP, tokens, size),
  section: () => sectionOption(SECTION, tokens, size),
  sieve: () => sieveCurveOption(SIEVE_CURVE, tokens, size),
  residuals: () =>
    residualOption({ name: 'quantile', points: AGAINST_NORMAL, band: NORMAL_BAND }, tokens, size),
  influence: () => influenceOption(INFLUENCE, tokens),
  spread: () => spreadCurveOption(SPREADS, tokens),
  tradeOff: () => tradeOffOption(TRADE_OFF, tokens, size),
};

describe('options', () => {
  it.each(Object.keys(OPTIONS))('draw %s without a number that is none', (name) => {
    const svg = svgOf(OPTIONS[name]!());
    expect(svg).not.toMatch(/NaN|Infinity|undefined/);
    expect(svg.length).toBeGreaterThan(2000);
  });

  it.each(Object.keys(OPTIONS))('give the same picture for the same numbers: %s', (name) => {
    expect(plain(svgOf(OPTIONS[name]!()))).toBe(plain(svgOf(OPTIONS[name]!())));
  });
});

describe('the map', () => {
  it('wears the spark once and all its words', () => {
    const svg = svgOf(OPTIONS['map']!());
    expect(svg.match(new RegExp(`fill="${tokens.spark}"`, 'g'))).toHaveLength(1);
    for (const words of ['80 %', '18 kWh/t', 'field limit 9 kV/mm', '6 runs', 'A′', 'Gap, mm'])
      expect(svg).toContain(words);
  });

  it('draws the next slice as if it were the first', () => {
    const other = contourMapOption(
      { ...SAMPLE_MAP, runs: [], goals: [], section: null },
      tokens,
      size,
    );
    const map = OPTIONS['map']!();
    expect(plain(svgOf(other, map))).toBe(plain(svgOf(map)));
  });

  it('draws without limits, support, goals, runs, section and set-point', () => {
    const bare = {
      ...SAMPLE_MAP,
      limits: [],
      support: null,
      goals: [],
      runs: [],
      section: null,
      setPoint: null,
    };
    const svg = svgOf(contourMapOption(bare, tokens, size));
    expect(svg).not.toMatch(/NaN|undefined/);
    expect(svg).not.toContain(tokens.spark);
  });

  it('draws a slice of which nothing can be set', () => {
    const limits = [{ label: 'power limit', margin: SAMPLE_MAP.z.map((row) => row.map(() => -1)) }];
    expect(svgOf(contourMapOption({ ...SAMPLE_MAP, limits }, tokens, size))).not.toMatch(/NaN/);
  });
});
