import { formatNumber } from '@/lib/format';
import { Button } from './Button';

interface LoadingStateProps {
  /** What is being done: “Looking at 7 093 settings”. */
  readonly label: string;
  /** For work that takes seconds: how far it is. */
  readonly progress?: { readonly done: number; readonly total: number } | null;
  readonly onStop?: () => void;
}

const WIDTHS = ['w-3/4', 'w-7/12', 'w-5/6', 'w-5/12'];

/** Still bars in the shape of what comes; a long job shows its count and can be stopped. Nothing spins. */
export function LoadingState({ label, progress, onStop }: LoadingStateProps) {
  return (
    <div className="grid gap-3 p-4">
      <div aria-hidden="true" className="grid gap-2.5">
        {WIDTHS.map((width) => (
          <span key={width} className={`h-3 bg-sunk ${width}`} />
        ))}
      </div>
      <div className="flex flex-wrap items-center gap-3 text-2 text-ink-3">
        <p role="status">{label}</p>
        {progress && (
          <p>
            {formatNumber(progress.done)} of {formatNumber(progress.total)}
          </p>
        )}
        {onStop && (
          <Button size="small" onClick={onStop}>
            Stop
          </Button>
        )}
      </div>
    </div>
  );
}
