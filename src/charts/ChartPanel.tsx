import { useState, type ReactNode } from 'react';
import { Button } from '@/components/Button';
import { Panel } from '@/components/Panel';
import type { ChartSize } from './axes';
import { Chart } from './Chart';
import type { ChartTokens } from './tokens';
import type { EChartsCoreOption } from 'echarts/core';

interface ChartPanelProps {
  readonly name: string;
  readonly fact?: ReactNode;
  readonly label: string;
  readonly option: (tokens: ChartTokens, size: ChartSize) => EChartsCoreOption;
  readonly height: number;
  readonly table: ReactNode;
  /** Keys and a sentence, below the drawing. */
  readonly keys?: ReactNode;
}

/** A panel with one chart and its switch to the same numbers as a table. */
export function ChartPanel(props: ChartPanelProps) {
  const { name, fact, label, option, height, table, keys } = props;
  const [isTable, setTable] = useState(false);
  return (
    <Panel
      name={name}
      fact={fact}
      isFlush
      link={
        <Button variant="quiet" size="small" onClick={() => setTable(!isTable)}>
          {isTable ? 'As a chart' : 'As a table'}
        </Button>
      }
    >
      <div className={isTable ? undefined : 'p-3.5 pb-2'}>
        <Chart {...{ label, option, height, table, isTable }} />
        {!isTable && keys && <div className="mt-1 text-1 text-ink-3">{keys}</div>}
      </div>
    </Panel>
  );
}
