import { lazy, Suspense, useRef, type ReactNode } from 'react';
import type { EChartsCoreOption } from 'echarts/core';
import { Notice } from '@/components/Notice';
import type { ChartSize } from './axes';
import { ChartBoundary } from './ChartBoundary';
import { loadChartFonts } from './loadChartFonts';
import type { ChartTokens } from './tokens';
import { useChartSurface } from './useChartSurface';

const ChartCanvas = lazy(async () => {
  const [module] = await Promise.all([import('./ChartCanvas'), loadChartFonts()]);
  return { default: module.ChartCanvas };
});

interface ChartProps {
  /** What the chart shows, in one sentence. */
  readonly label: string;
  /** The same numbers: shown instead on request, and when the drawing fails. */
  readonly table: ReactNode;
  /** Pure: from colours and size in pixels to the option. */
  readonly option: (tokens: ChartTokens, size: ChartSize) => EChartsCoreOption;
  readonly height: number;
  readonly isTable?: boolean;
}

/** Draws an option in the colours of the place where it stands, or shows its table. */
export function Chart({ label, table, option, height, isTable = false }: ChartProps) {
  if (isTable) return table;
  const failed = (
    <>
      <Notice tone="caution" claim="This chart could not be drawn.">
        Its numbers are in the table below.
      </Notice>
      {table}
    </>
  );
  return (
    <ChartBoundary fallback={failed}>
      <div role="img" aria-label={label}>
        <Drawing option={option} height={height} />
      </div>
    </ChartBoundary>
  );
}

function Drawing({ option, height }: Pick<ChartProps, 'option' | 'height'>) {
  const ref = useRef<HTMLDivElement>(null);
  const surface = useChartSurface(ref);
  return (
    <div ref={ref} style={{ height }}>
      {surface && (
        <Suspense fallback={<div className="size-full bg-sunk" />}>
          <ChartCanvas
            option={option(surface.tokens, { width: surface.width, height })}
            height={height}
          />
        </Suspense>
      )}
    </div>
  );
}
