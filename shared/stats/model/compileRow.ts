import { isCategorical, type Factor } from '../coding/factor';
import type { Term } from './term';

/** Writes the model’s row at a point: coded values, or a level’s place. */
export type RowAt = (point: ArrayLike<number>, out: Float64Array) => void;

interface Compiled {
  /** Places of numeric factors, each as often as its power. */
  readonly product: readonly number[];
  readonly contrasts: readonly { factor: number; level: number; last: number }[];
}

/**
 * The model matrix one row at a time and without garbage, for loops over many points. The same numbers
 * as `modelMatrix`.
 */
export function compileRow(factors: readonly Factor[], terms: readonly Term[]): RowAt {
  const compiled = terms.map((term): Compiled => ({
    product: term.powers.flatMap((power, i) => new Array<number>(power).fill(i)),
    contrasts: term.contrasts.map(({ factor, level }) => {
      const categorical = factors[factor]!;
      const last = isCategorical(categorical) ? categorical.levels.length - 1 : 0;
      return { factor, level, last };
    }),
  }));
  return (point, out) => {
    for (let j = 0; j < compiled.length; j++) {
      const { product, contrasts } = compiled[j]!;
      let value = 1;
      for (const place of product) value *= point[place]!;
      for (const { factor, level, last } of contrasts) {
        const at = point[factor]!;
        value *= at === last ? -1 : at === level ? 1 : 0;
      }
      out[j] = value;
    }
  };
}
