import type { Predictor } from '../fit/predict';
import { isCategorical } from '../coding/factor';
import { isInside, type Axis, type Region } from '../design/region';
import { termValue } from '../model/modelMatrix';

/**
 * Walks the lattice of a region and evaluates models along it: for each combination of the outer factors
 * a model is a polynomial in the innermost one, so that a point costs a few multiplications.
 */
export interface LatticePoint {
  /** Places on the axes; reused between points. */
  readonly places: Int32Array;
  /** Settings in the order of the factors; reused. */
  readonly values: Float64Array;
  /** Mean of each model on its analysed scale; reused. */
  readonly means: Float64Array;
}

interface InnerModel {
  /** Terms by power of the innermost factor: place of the coefficient. */
  readonly byPower: readonly (readonly number[])[];
  readonly coefficients: Float64Array;
}

function innerModelOf(predictor: Predictor, inner: number): InnerModel {
  const highest = Math.max(0, ...predictor.terms.map(({ powers }) => powers[inner] ?? 0));
  const byPower: number[][] = Array.from({ length: highest + 1 }, () => []);
  predictor.terms.forEach((term, j) => byPower[term.powers[inner] ?? 0]!.push(j));
  return { byPower, coefficients: new Float64Array(highest + 1) };
}

/** Puts the outer factors' values into the coefficients of the inner polynomial. */
function settle(model: InnerModel, predictor: Predictor, coded: number[], inner: number): void {
  const kept = coded[inner]!;
  coded[inner] = 1;
  model.byPower.forEach((terms, power) => {
    let sum = 0;
    for (const j of terms)
      sum += predictor.coefficients[j]! * termValue(predictor.factors, predictor.terms[j]!, coded);
    model.coefficients[power] = sum;
  });
  coded[inner] = kept;
}

function evaluate(coefficients: Float64Array, x: number): number {
  let value = 0;
  for (let power = coefficients.length - 1; power >= 0; power--)
    value = value * x + coefficients[power]!;
  return value;
}

/** The innermost axis: the longest numeric one, or −1 when all factors have names for levels. */
function innermost({ factors, axes }: Region): number {
  let best = -1;
  factors.forEach((factor, i) => {
    if (isCategorical(factor)) return;
    if (best < 0 || axes[i]!.values.length > axes[best]!.values.length) best = i;
  });
  return best;
}

interface Walk {
  readonly region: Region;
  readonly outer: readonly number[];
  readonly places: Int32Array;
  readonly values: Float64Array;
  readonly coded: number[];
}

function move({ region, places, values, coded }: Walk, i: number, place: number): void {
  const axis: Axis = region.axes[i]!;
  places[i] = place;
  values[i] = axis.values[place]!;
  coded[i] = axis.coded[place]!;
}

/** Steps the outer factors on; false when all combinations were visited. */
function step(walk: Walk): boolean {
  for (let o = walk.outer.length - 1; o >= 0; o--) {
    const i = walk.outer[o]!;
    const next = walk.places[i]! + 1;
    if (next < walk.region.axes[i]!.values.length) {
      move(walk, i, next);
      return true;
    }
    move(walk, i, 0);
  }
  return false;
}

/**
 * Visits every settable combination inside the constraints with the means of the models.
 *
 * @param onRow called once for each combination of the outer factors; return false to stop.
 */
export function walkLattice(
  region: Region,
  predictors: readonly Predictor[],
  visit: (point: LatticePoint) => void,
  onRow: () => boolean = () => true,
): void {
  const k = region.axes.length;
  const inner = innermost(region);
  const walk: Walk = {
    region,
    outer: Array.from({ length: k }, (_, i) => i).filter((i) => i !== inner),
    places: new Int32Array(k),
    values: new Float64Array(k),
    coded: new Array<number>(k).fill(0),
  };
  for (let i = 0; i < k; i++) move(walk, i, 0);
  const { places, values } = walk;
  const means = new Float64Array(predictors.length);
  const models = predictors.map((predictor) => innerModelOf(predictor, inner));
  const axis = inner < 0 ? { values: [0], coded: [0] } : region.axes[inner]!;
  do {
    models.forEach((model, m) => {
      settle(model, predictors[m]!, walk.coded, inner);
    });
    for (let place = 0; place < axis.values.length; place++) {
      if (inner >= 0) move(walk, inner, place);
      if (!isInside(region, values)) continue;
      for (let m = 0; m < models.length; m++)
        means[m] = evaluate(models[m]!.coefficients, axis.coded[place]!);
      visit({ places, values, means });
    }
    if (!onRow()) return;
  } while (step(walk));
}
