import type { EChartsOption } from 'echarts';
import {
  Component,
  lazy,
  Suspense,
  useMemo,
  useState,
  useSyncExternalStore,
  type ReactNode,
} from 'react';
import { DataTable, type Column } from '@/components/DataTable';
import { Notice } from '@/components/Notice';
import { currentTheme, onThemeChange, type Theme } from '@/lib/theme';
import { readTokens, type ChartTokens } from './tokens';

const EChart = lazy(() => import('./EChart').then(({ EChart: Drawing }) => ({ default: Drawing })));

/** A plot that fails leaves the numbers on screen. */
class PlotBoundary extends Component<{ readonly children: ReactNode }, { hasFailed: boolean }> {
  override state = { hasFailed: false };

  static getDerivedStateFromError() {
    return { hasFailed: true };
  }

  override render() {
    return this.state.hasFailed ? (
      <Notice tone="caution" claim="This plot could not be drawn.">
        The same numbers stand in its table.
      </Notice>
    ) : (
      this.props.children
    );
  }
}

interface ChartFrameProps<Row> {
  /** One sentence on what is shown, for screen readers. */
  readonly label: string;
  readonly table: {
    readonly columns: readonly Column<Row>[];
    readonly rows: readonly Row[];
    readonly rowKey: (row: Row) => string | number;
  };
  readonly children: ReactNode;
  /** A drawing that takes focus names itself. */
  readonly isInteractive?: boolean;
}

/** Every chart has its table: a switch below it shows the same numbers. */
export function ChartFrame<Row>({
  label,
  table,
  children,
  isInteractive = false,
}: ChartFrameProps<Row>) {
  const [isTable, setIsTable] = useState(false);
  return (
    <figure className="grid gap-2 m-0 min-w-0">
      {isTable ? (
        <DataTable caption={label} {...table} />
      ) : (
        <div {...(isInteractive ? {} : { role: 'img', 'aria-label': label })}>
          <PlotBoundary>{children}</PlotBoundary>
        </div>
      )}
      <figcaption className="text-right">
        <button type="button" className="link text-2" onClick={() => setIsTable(!isTable)}>
          {isTable ? 'As a chart' : 'As a table'}
        </button>
      </figcaption>
    </figure>
  );
}

/** Read once for each theme: the page has switched by the time a chart asks. */
const tokensOf = (_theme: Theme): ChartTokens => readTokens();

interface ChartProps<Row> extends Omit<ChartFrameProps<Row>, 'children' | 'isInteractive'> {
  /** Pure: numbers and tokens to an ECharts option. */
  readonly option: (tokens: ChartTokens) => EChartsOption;
  readonly height: number;
}

export function Chart<Row>({ option, height, ...frame }: ChartProps<Row>) {
  const theme = useSyncExternalStore(onThemeChange, currentTheme);
  const tokens = useMemo(() => tokensOf(theme), [theme]);
  return (
    <ChartFrame {...frame}>
      <Suspense fallback={<div style={{ height }} />}>
        <EChart option={option(tokens)} height={height} />
      </Suspense>
    </ChartFrame>
  );
}
