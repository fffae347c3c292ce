interface DialTileProps {
  readonly name: string;
  /** As it is dialled, with the digits of its step. */
  readonly figure: string;
  readonly unit?: string;
  /** “from 180” when it changed since the last run, with its direction; null when it is as before. */
  readonly change: { readonly from: string; readonly isUp: boolean } | null;
}

/** One set-point at the bench, to be read from two metres. What changed since the last run is inverted. */
export function DialTile({ name, figure, unit, change }: DialTileProps) {
  return (
    <div className="flex flex-col border border-line bg-surface px-3 py-2 md:px-5 md:py-3">
      <div className="flex justify-between gap-2 text-2 text-ink-2 md:text-4">
        <span>{name}</span>
        {change ? (
          <strong className="bg-ink px-2 font-mark whitespace-nowrap text-surface">
            {change.isUp ? '↑' : '↓'} from {change.from}
          </strong>
        ) : (
          <span className="text-ink-3">as before</span>
        )}
      </div>
      <div className="my-auto font-mono text-8 tracking-tight whitespace-nowrap md:text-dial-1 lg:text-dial-2">
        {figure}
        {unit && (
          <span className="ml-1.5 font-sans text-5 tracking-normal text-ink-3 md:text-7">
            {unit}
          </span>
        )}
      </div>
    </div>
  );
}
