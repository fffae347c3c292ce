interface TermShapeProps {
  readonly kind: 'straight' | 'square' | 'product';
  /** The shape follows its sign; null for a term that is left out. */
  readonly estimate: number | null;
}

/** On a 38 × 20 grid: a slope, a bow, or two slopes that cross. */
function pathsOf(kind: TermShapeProps['kind'], rise: number): string[] {
  const [from, to] = [10 + 6 * rise, 10 - 6 * rise];
  if (kind === 'square') return [`M0 ${to}Q19 ${10 + 18 * rise} 38 ${to}`];
  const slope = `M0 ${from}L38 ${to}`;
  return kind === 'straight' ? [slope] : [slope, `M0 ${to}L38 ${from}`];
}

/** What a term does to the response, before any number is read. */
export function TermShape({ kind, estimate }: TermShapeProps) {
  const isOut = estimate === null;
  return (
    <svg viewBox="0 0 38 20" width={38} height={20} fill="none" aria-hidden="true">
      <path d="M0 10H38" stroke="var(--line)" />
      {pathsOf(kind, isOut ? 0 : Math.sign(estimate)).map((path, i) => (
        <path
          key={i}
          d={path}
          stroke={isOut ? 'var(--ink-3)' : 'var(--ink)'}
          strokeWidth={i === 0 ? 1.6 : 1.2}
          strokeDasharray={isOut || i > 0 ? '2.5 2' : undefined}
        />
      ))}
    </svg>
  );
}
