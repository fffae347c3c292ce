import { WORDMARK_LETTERS } from './wordmarkLetters';

const HALVES =
  'M2 28V21L9.5 8.5L14.4 12.6L12.2 18.2L15.6 19.8L12.4 28Z' +
  'M16.2 28L19.8 18.2L16.4 16.6L20.6 4L25.4 12.5L30 20V28Z';
const CONTOUR = 'M1.5 25H13.1M18.4 22.4H30.5';
const SPARK = 'M18.05 6.6L14.3 17.4L17.7 19L14.35 28';
const SPARK_OF_THE_I = 'M100.1 5.03L102.22 7.88L100.1 10.73L97.99 7.88Z';

function Crag() {
  return (
    <>
      <path d={HALVES} className="fill-ink" />
      <path d={CONTOUR} className="fill-none stroke-paper" strokeWidth={1.3} />
      <path
        d={SPARK}
        className="fill-none stroke-accent"
        strokeWidth={1.9}
        strokeLinejoin="miter"
        strokeMiterlimit={8}
      />
    </>
  );
}

/** Two halves of a crag, a spark between them, and the name. From 20 px height. */
export function Wordmark({ height = 26 }: { height?: number }) {
  return (
    <svg viewBox="0 0 131 32" height={height} role="img" aria-label="Cragline">
      <Crag />
      <path d={WORDMARK_LETTERS} className="fill-ink" />
      <path d={SPARK_OF_THE_I} className="fill-accent" />
    </svg>
  );
}

/** The mark alone, for the bench. From 24 px height. */
export function Mark({ height = 30 }: { height?: number }) {
  return (
    <svg viewBox="0 0 32 32" height={height} role="img" aria-label="Cragline">
      <Crag />
    </svg>
  );
}
