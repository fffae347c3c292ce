export type NoticeTone = 'quiet' | 'caution' | 'voltage' | 'stop';

const LABELS: Record<NoticeTone, string> = {
  quiet: 'Note',
  caution: 'Caution',
  voltage: 'High voltage',
  stop: 'Stop',
};

function Shape({ tone }: { tone: NoticeTone }) {
  switch (tone) {
    case 'quiet':
      return (
        <g className="fill-none stroke-ink-2">
          <rect x={2} y={2} width={14} height={14} strokeWidth={1.3} />
          <path d="M9 8V13M9 5V6.6" strokeWidth={1.6} />
        </g>
      );
    case 'stop':
      return (
        <>
          <path d="M6 1H12L17 6V12L12 17H6L1 12V6Z" className="fill-stop" />
          <path d="M5 9H13" strokeWidth={2.2} className="stroke-stop-wash" />
        </>
      );
    case 'caution':
    case 'voltage':
      return (
        <g className="fill-none stroke-on-caution">
          <path d="M9 2L17 16H1Z" strokeWidth={1.2} className="fill-caution-mark" />
          <path
            d={tone === 'caution' ? 'M9 7V11M9 12.6V14.2' : 'M9.8 6L7.2 10.4H9.6L8.4 14'}
            strokeWidth={tone === 'caution' ? 1.6 : 1.3}
          />
        </g>
      );
  }
}

/** Square, triangle, octagon: the shape says the tone without colour. */
export function NoticeIcon({ tone, size = 18 }: { tone: NoticeTone; size?: number }) {
  return (
    <svg
      viewBox="0 0 18 18"
      width={size}
      height={size}
      role="img"
      aria-label={LABELS[tone]}
      className="mt-0.5 flex-none"
    >
      <Shape tone={tone} />
    </svg>
  );
}
