import { lazy, Suspense, useRef } from 'react';
import type { EChartsCoreOption } from 'echarts/core';
import type { ChartSize } from './axes';
import type { ChartTokens } from './tokens';
import { useChartSurface } from './useChartSurface';

const EChart = lazy(() => import('./EChart').then(({ EChart: Drawn }) => ({ default: Drawn })));

/** Pure: from colours and the size in pixels to what is drawn. */
export type OptionOf = (tokens: ChartTokens, size: ChartSize) => EChartsCoreOption;

interface DrawingProps {
  readonly option: OptionOf;
  readonly height: number;
}

/** An option in the colours and width of the place where it stands. */
export function Drawing({ option, height }: DrawingProps) {
  const ref = useRef<HTMLDivElement>(null);
  const surface = useChartSurface(ref);
  return (
    <div ref={ref} className="min-w-0 overflow-hidden" style={{ height }}>
      {surface && (
        <Suspense fallback={null}>
          <EChart
            option={option(surface.tokens, { width: surface.width, height })}
            height={height}
          />
        </Suspense>
      )}
    </div>
  );
}
