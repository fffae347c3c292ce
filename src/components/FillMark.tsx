export type Fill = 'full' | 'half' | 'hollow' | 'struck';

const SHAPES: Record<Fill, string> = {
  full: 'bg-ink border-ink',
  half: 'bg-half-fill border-ink',
  hollow: 'border-ink',
  struck: 'border-stop',
};

/** Yes, partly, not yet, cannot be: for terms of a plan and duties before a signature. Words stand beside it. */
export function FillMark({ fill, label }: { fill: Fill; label?: string }) {
  return (
    <span
      className={`relative inline-block size-2.5 flex-none overflow-hidden border-frame ${SHAPES[fill]}`}
      {...(label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true })}
    >
      {fill === 'struck' && (
        <svg viewBox="0 0 10 10" className="absolute inset-0 size-full stroke-stop">
          <path d="M0 0L10 10" strokeWidth={2} />
        </svg>
      )}
    </span>
  );
}
