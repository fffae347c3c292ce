import type { SieveRow } from './curve';

export interface ShapeIssue {
  readonly apertureMm: number;
  readonly message: string;
}

/** How far a class may stand out from its neighbours' trend, as a ratio, before a person should look. */
const OUT_OF_LINE = 1.9;
/** Classes lighter than this share of the whole scatter too much to be judged. */
const SMALLEST_SHARE = 0.01;

interface Density {
  readonly apertureMm: number;
  readonly lnSize: number;
  /** Percent a natural-log unit of size: comparable between unequal classes. */
  readonly density: number;
}

function densities(rows: readonly SieveRow[], totalG: number): Density[] {
  return rows.slice(1).map(({ apertureMm, retainedG }, i) => {
    const above = rows[i]!.apertureMm;
    return {
      apertureMm,
      lnSize: (Math.log(above) + Math.log(apertureMm)) / 2,
      density: retainedG / totalG / Math.log(above / apertureMm),
    };
  });
}

/** ln density expected from the neighbours on both sides, or null at the ends. */
function expected(all: readonly Density[], i: number): number | null {
  const before = all[i - 1];
  const after = all[i + 1];
  const here = all[i]!;
  if (!before || !after || before.density <= 0 || after.density <= 0) return null;
  const share = (here.lnSize - before.lnSize) / (after.lnSize - before.lnSize);
  return Math.log(before.density) + share * (Math.log(after.density) - Math.log(before.density));
}

const widthOf = (rows: readonly SieveRow[], apertureMm: number) => {
  const i = rows.findIndex((row) => row.apertureMm === apertureMm);
  return Math.log(rows[i - 1]!.apertureMm / apertureMm);
};

/** Too much on a sieve and too little on the next finer one: the pattern of a pegged mesh. */
function looksBlinded(ratios: readonly (number | null)[], i: number): boolean {
  const here = ratios[i] ?? 0;
  const next = ratios[i + 1] ?? 0;
  return here > Math.log(OUT_OF_LINE) && next < -Math.log(OUT_OF_LINE) / 2;
}

/**
 * Looks at the shape of a size distribution, which a mass balance cannot see: a sieve that holds much
 * more than the trend of its neighbours is blinded, or two rows are swapped, or a tare was missed.
 * Common practice, no source; a hint to look again, never a refusal.
 *
 * @param sieves masses in g.
 */
export function shapeIssues(sieves: readonly SieveRow[], panG: number): ShapeIssue[] {
  const rows = [...sieves].sort((a, b) => b.apertureMm - a.apertureMm);
  const totalG = rows.reduce((sum, { retainedG }) => sum + retainedG, panG);
  if (totalG <= 0) return [];
  const all = densities(rows, totalG);
  const ratios = all.map((each, i) => {
    const trend = expected(all, i);
    return trend === null || each.density <= 0 ? null : Math.log(each.density) - trend;
  });
  return all.flatMap(({ apertureMm, density }, i): ShapeIssue[] => {
    const ratio = ratios[i] ?? null;
    const isHeavy = density * widthOf(rows, apertureMm) > SMALLEST_SHARE;
    if (ratio === null || ratio < Math.log(OUT_OF_LINE) || !isHeavy) return [];
    const message = looksBlinded(ratios, i)
      ? `Much lies on ${apertureMm} mm and little on the next finer sieve: the mesh may be blinded. Brush it and sieve again.`
      : `More lies on ${apertureMm} mm than its neighbours suggest. Was a tare missed, or are two rows swapped?`;
    return [{ apertureMm, message }];
  });
}
