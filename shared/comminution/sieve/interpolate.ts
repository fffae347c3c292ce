import type { SievePoint } from './sieveCurve';

/** `logSize`: passing linear in ln(size). `logLog`: ln(passing) linear in ln(size). */
export type Interpolation = 'logSize' | 'logLog';

/** A number, or why there is none. */
export type Reading =
  | { readonly value: number; readonly reason?: undefined }
  | { readonly value: null; readonly reason: string };

const none = (reason: string): Reading => ({ value: null, reason });
const same = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * b;

function outside(points: readonly SievePoint[], what: string): string {
  const top = points[0]!.apertureMm;
  const finest = points[points.length - 1]!.apertureMm;
  return `${what} lies outside the sieve stack (${finest} to ${top} mm), so it is not given.`;
}

const NOTHING = 'Nothing was recovered, so there is no size distribution.';

/**
 * Share of mass that passes a size: read off at a sieve, interpolated between two, never extrapolated.
 *
 * @param points curve, coarse to fine.
 * @returns per cent, or null with the reason.
 * @see ISO 9276-1:1998 (graphs of size distributions).
 */
export function passingAt(
  points: readonly SievePoint[],
  sizeMm: number,
  interpolation: Interpolation,
): Reading {
  if (points.length === 0) return none(NOTHING);
  const hit = points.find(({ apertureMm }) => same(apertureMm, sizeMm));
  if (hit) return { value: hit.passingPercent };
  const below = points.findIndex(({ apertureMm }) => apertureMm < sizeMm);
  if (below <= 0) return none(outside(points, `Passing ${sizeMm} mm`));
  const fine = points[below]!;
  const coarse = points[below - 1]!;
  const share = Math.log(sizeMm / fine.apertureMm) / Math.log(coarse.apertureMm / fine.apertureMm);
  const [a, b] = [fine.passingPercent, coarse.passingPercent];
  if (interpolation === 'logSize') return { value: a + share * (b - a) };
  if (b === 0) return { value: 0 };
  if (a === 0)
    return none(
      `Passing ${sizeMm} mm: log–log interpolation needs something below ${fine.apertureMm} mm.`,
    );
  return { value: a * (b / a) ** share };
}

/**
 * Size that a given share of mass passes (P80, P50): between the two sieves that bracket it, never
 * extrapolated. Where the curve is flat at that share, the smaller size.
 *
 * @param percent share passing, above 0 and below 100.
 * @returns mm, or null with the reason.
 * @see ISO 9276-1:1998; Gaudin–Schuhmann axes for `logLog`.
 */
export function sizeAt(
  points: readonly SievePoint[],
  percent: number,
  interpolation: Interpolation,
): Reading {
  const finest = points.at(-1);
  if (!finest) return none(NOTHING);
  const above = points.findLastIndex(({ passingPercent }) => passingPercent >= percent);
  const coarse = points[above];
  if (!coarse) return none(outside(points, `The size that ${percent} % passes`));
  if (coarse.passingPercent === percent) return { value: coarse.apertureMm };
  const fine = points[above + 1];
  if (!fine) return none(outside(points, `The size that ${percent} % passes`));
  const [a, b] = [fine.passingPercent, coarse.passingPercent];
  if (interpolation === 'logLog' && a === 0)
    return none(
      `The size that ${percent} % passes: log–log interpolation needs something below ${fine.apertureMm} mm.`,
    );
  const share =
    interpolation === 'logSize' ? (percent - a) / (b - a) : Math.log(percent / a) / Math.log(b / a);
  return { value: fine.apertureMm * (coarse.apertureMm / fine.apertureMm) ** share };
}
