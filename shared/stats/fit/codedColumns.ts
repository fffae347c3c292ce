import { isCategorical, type Factor, type NumericFactor, type Settings } from '../coding/factor';
import {
  DD_ONE,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddSubtract,
  twoProduct,
  type Dd,
} from '../linalg/dd';
import { ddSet, ddZeros, type DdMatrix } from '../linalg/ddMatrix';
import { pointOf } from '../model/modelMatrix';
import type { Term } from '../model/term';

/** Middle and half-range of a factor's analysed axis (u or ln u), exact in double-double. */
export function axisOf(factor: NumericFactor): { mid: Dd; half: Dd } {
  const isLog = factor.scale === 'log';
  const low = dd(isLog ? Math.log(factor.low) : factor.low);
  const high = dd(isLog ? Math.log(factor.high) : factor.high);
  const halved = (x: Dd): Dd => [x[0] / 2, x[1] / 2];
  return { mid: halved(ddAdd(low, high)), half: halved(ddSubtract(high, low)) };
}

/** One run's coded values in double-double; for a categorical factor the place of its level. */
export function exactPoint(factors: readonly Factor[], settings: Settings): Dd[] {
  const point = pointOf(factors, settings);
  return factors.map((factor, i) => {
    if (isCategorical(factor)) return dd(point[i]!);
    const u = settings[factor.key] as number; // pointOf has refused anything else
    const { mid, half } = axisOf(factor);
    return ddDivide(ddSubtract(dd(factor.scale === 'log' ? Math.log(u) : u), mid), half);
  });
}

function exactTerm(factors: readonly Factor[], term: Term, point: readonly Dd[]): Dd {
  let value = DD_ONE;
  term.powers.forEach((power, i) => {
    for (let k = 0; k < power; k++) value = ddMultiply(value, point[i]!);
  });
  for (const { factor, level } of term.contrasts) {
    const categorical = factors[factor]!;
    if (!isCategorical(categorical)) continue;
    const at = point[factor]![0];
    const last = categorical.levels.length - 1;
    value = ddMultiply(value, dd(at === last ? -1 : at === level ? 1 : 0));
  }
  return value;
}

/** Sum-to-zero columns of blocks: +1 in its own block, −1 in the last, else 0. */
export function blockContrast(block: number, blocks: readonly number[], column: number): number {
  if (block === blocks.at(-1)) return -1;
  return block === blocks[column] ? 1 : 0;
}

export interface CodedRun {
  readonly settings: Settings;
  readonly block: number;
  readonly weight: number;
}

export interface CodedColumns {
  /** n × p: intercept (when first of `terms`), then blocks, then the other terms; rows times √weight. */
  readonly x: DdMatrix;
  readonly names: readonly string[];
  readonly rootWeights: readonly Dd[];
}

function rootOf(weight: number): Dd {
  const root = Math.sqrt(weight);
  const [product, error] = twoProduct(root, root);
  return [root, (weight - product - error) / (2 * root)];
}

/**
 * The coded columns of a model with its blocks, in double-double: coding first, then products and powers
 * of the coded values.
 *
 * @param blocks numbers of the blocks that are fitted, ascending; fewer than two: none.
 */
export function codedColumns(
  factors: readonly Factor[],
  terms: readonly Term[],
  runs: readonly CodedRun[],
  blocks: readonly number[],
): CodedColumns {
  const hasIntercept =
    terms[0]?.powers.every((power) => power === 0) === true && terms[0].contrasts.length === 0;
  const start = hasIntercept ? 1 : 0;
  const blockColumns = Math.max(0, blocks.length - 1);
  const names = [
    ...terms.slice(0, start).map(({ name }) => name),
    ...Array.from({ length: blockColumns }, (_, i) => `block[${blocks[i]!}]`),
    ...terms.slice(start).map(({ name }) => name),
  ];
  const x = ddZeros(runs.length, names.length);
  const rootWeights = runs.map(({ weight }) => (weight === 1 ? DD_ONE : rootOf(weight)));
  runs.forEach(({ settings, block }, i) => {
    const point = exactPoint(factors, settings);
    const root = rootWeights[i]!;
    terms.forEach((term, j) => {
      const column = j < start ? j : j + blockColumns;
      ddSet(x, i, column, ddMultiply(root, exactTerm(factors, term, point)));
    });
    for (let j = 0; j < blockColumns; j++)
      ddSet(x, i, start + j, ddMultiply(root, dd(blockContrast(block, blocks, j))));
  });
  return { x, names, rootWeights };
}
