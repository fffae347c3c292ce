import { DOT_PATH, NAME_PATH } from './wordmarkPaths';

interface WordmarkProps {
  readonly height?: number;
  /** On the bench the mark stands alone. */
  readonly isMarkOnly?: boolean;
}

/** Two halves of a crag, a spark-shaped crack, one contour line thrown across it. */
export function Wordmark({ height = 26, isMarkOnly = false }: WordmarkProps) {
  return (
    <svg
      className="flex-none"
      height={height}
      viewBox={isMarkOnly ? '0 0 32 32' : '0 0 131 32'}
      role="img"
      aria-label="Cragline"
    >
      <path
        d="M2 28V21L9.5 8.5L14.4 12.6L12.2 18.2L15.6 19.8L12.4 28Z M16.2 28L19.8 18.2L16.4 16.6L20.6 4L25.4 12.5L30 20V28Z"
        fill="var(--ink)"
      />
      <path d="M1.5 25H13.1M18.4 22.4H30.5" stroke="var(--paper)" strokeWidth="1.3" fill="none" />
      <path
        d="M18.05 6.6L14.3 17.4L17.7 19L14.35 28"
        fill="none"
        stroke="var(--spark)"
        strokeWidth="1.9"
        strokeMiterlimit="8"
      />
      {!isMarkOnly && (
        <>
          <path d={NAME_PATH} fill="var(--ink)" />
          <path d={DOT_PATH} fill="var(--spark)" />
        </>
      )}
    </svg>
  );
}
