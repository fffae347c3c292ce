import { isCategorical, type Factor } from '../coding/factor';
import {
  DD_ONE,
  DD_ZERO,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddNegate,
  ddPower,
  toNumber,
  type Dd,
} from '../linalg/dd';
import { ddGet, type DdMatrix } from '../linalg/ddMatrix';
import { parseTerm, type Term } from '../model/term';
import { axisOf } from './codedColumns';

/** A product of powers and contrasts, and its weight in the expansion of one coded term. */
interface Piece {
  readonly powers: readonly number[];
  readonly contrasts: Term['contrasts'];
  readonly weight: Dd;
}

function binomial(n: number, k: number): number {
  let value = 1;
  for (let i = 1; i <= k; i++) value = (value * (n - k + i)) / i;
  return value;
}

/** Expands Π((uᵢ − mᵢ)/hᵢ)^pᵢ into powers of the uᵢ. */
function expand(factors: readonly Factor[], term: Term): Piece[] {
  let pieces: Piece[] = [
    { powers: factors.map(() => 0), contrasts: term.contrasts, weight: DD_ONE },
  ];
  term.powers.forEach((power, i) => {
    const factor = factors[i]!;
    if (power === 0 || isCategorical(factor)) return;
    const { mid, half } = axisOf(factor);
    const scale = ddPower(half, power);
    pieces = pieces.flatMap((piece) =>
      Array.from({ length: power + 1 }, (_, k): Piece => {
        const shift = ddPower(ddNegate(mid), power - k);
        const weight = ddDivide(ddMultiply([binomial(power, k), 0], shift), scale);
        return {
          powers: piece.powers.with(i, k),
          contrasts: piece.contrasts,
          weight: ddMultiply(piece.weight, weight),
        };
      }),
    );
  });
  return pieces;
}

function nameOf(factors: readonly Factor[], piece: Piece): string {
  const parts = piece.powers.flatMap((power, i) =>
    power === 0 ? [] : [power === 1 ? factors[i]!.key : `${factors[i]!.key}^${power}`],
  );
  for (const { factor, level } of piece.contrasts) {
    const categorical = factors[factor]!;
    if (isCategorical(categorical)) parts.push(`${categorical.key}[${categorical.levels[level]!}]`);
  }
  return parts.length === 0 ? 'intercept' : parts.join(':');
}

/**
 * The same polynomial in the factors' own units (in ln u for log factors), expanded in double-double,
 * never refitted.
 *
 * @param names of the coded columns; blocks are passed over, they have no units.
 * @param residualSd on the analysed scale, or null when there is nothing to judge an error by.
 */
export function realUnitsOf(
  factors: readonly Factor[],
  names: readonly string[],
  fit: { readonly coefficients: readonly Dd[]; readonly inverse: DdMatrix },
  residualSd: number | null,
): { term: string; estimate: number; standardError: number | null }[] {
  const rows = new Map<string, Map<number, Dd>>();
  names.forEach((name, j) => {
    if (name.startsWith('block[')) return;
    for (const piece of expand(factors, parseTerm(factors, name))) {
      const real = nameOf(factors, piece);
      const row = rows.get(real) ?? new Map<number, Dd>();
      row.set(j, ddAdd(row.get(j) ?? DD_ZERO, piece.weight));
      rows.set(real, row);
    }
  });
  const degree = (name: string) =>
    name === 'intercept' ? 0 : parseTerm(factors, name).powers.reduce((a, b) => a + b, 0);
  return [...rows]
    .sort(([a], [b]) => degree(a) - degree(b))
    .map(([term, row]) => {
      let estimate = DD_ZERO;
      let variance = DD_ZERO;
      for (const [j, weight] of row) {
        estimate = ddAdd(estimate, ddMultiply(weight, fit.coefficients[j]!));
        for (const [k, other] of row)
          variance = ddAdd(
            variance,
            ddMultiply(ddMultiply(weight, other), ddGet(fit.inverse, j, k)),
          );
      }
      const standardError =
        residualSd === null ? null : residualSd * Math.sqrt(Math.max(0, toNumber(variance)));
      return { term, estimate: toNumber(estimate), standardError };
    });
}
