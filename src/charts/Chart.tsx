import { Component, useState, type ReactNode } from 'react';
import { DataTable, type Column } from '@/components/DataTable';
import { Notice } from '@/components/Notice';
import { Drawing, type OptionOf } from './Drawing';

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
  /** Held by the caller when a key of the drawing switches it too. */
  readonly view?: { readonly isTable: boolean; readonly onSwitched: (isTable: boolean) => void };
}

/** Every chart has its table: a switch below it shows the same numbers. */
export function ChartFrame<Row>({
  label,
  table,
  children,
  isInteractive = false,
  view,
}: ChartFrameProps<Row>) {
  const [own, setOwn] = useState(false);
  const { isTable, onSwitched } = view ?? { isTable: own, onSwitched: setOwn };
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
        <button type="button" className="link text-2" onClick={() => onSwitched(!isTable)}>
          {isTable ? 'As a chart' : 'As a table'}
        </button>
      </figcaption>
    </figure>
  );
}

interface ChartProps<Row> extends Omit<
  ChartFrameProps<Row>,
  'children' | 'isInteractive' | 'view'
> {
  readonly option: OptionOf;
  readonly height: number;
}

export function Chart<Row>({ option, height, ...frame }: ChartProps<Row>) {
  return (
    <ChartFrame {...frame}>
      <Drawing option={option} height={height} />
    </ChartFrame>
  );
}
