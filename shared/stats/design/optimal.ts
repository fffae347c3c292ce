import { isCategorical } from '../coding/factor';
import { StatsError } from '../errors';
import { bilinear, cholesky, gramOf, inverseOf, lnDeterminant } from '../linalg/cholesky';
import { blockContrast } from '../fit/codedColumns';
import { termValue } from '../model/modelMatrix';
import type { Term } from '../model/term';
import { seeded, type Random } from '../random/random';
import { regionMoments } from './evaluation';
import { isInside, type Region } from './region';

export type OptimalCriterion = 'D' | 'I';

export interface OptimalOptions {
  readonly terms: readonly Term[];
  /** Runs to choose, beside those kept. */
  readonly count: number;
  readonly criterion: OptimalCriterion;
  /** Coded points that stay, with their blocks. */
  readonly kept: readonly { readonly coded: readonly number[]; readonly block: number }[];
  /** Block of each run to choose; a single block everywhere: none. */
  readonly blocks: readonly number[];
  readonly seed: number;
  readonly starts?: number;
}

export interface OptimalDesign {
  readonly points: readonly (readonly number[])[];
  /** D: ln |XᵀX| (larger is better); I: average prediction variance times n (smaller is better). */
  readonly value: number;
  /** The same for the start that the best one came from. */
  readonly startValue: number;
}

const STARTS = 12;
const MAX_PASSES = 40;
const MAX_DRAWS = 20_000;
/** Keeps a start from a few runs invertible; it is taken out again before anything is reported. */
const RIDGE = 1e-6;
const WORTH_IT = 1e-9;

class Exchange {
  private readonly p: number;
  private readonly distinct: readonly number[];
  private readonly keptRows: readonly Float64Array[];
  private readonly moments: Float64Array | null;
  private readonly blockOfRun: readonly number[];

  constructor(
    private readonly region: Region,
    private readonly options: OptimalOptions,
  ) {
    const { terms, kept, blocks, criterion } = options;
    this.distinct = [...new Set([...blocks, ...kept.map(({ block }) => block)])].sort(
      (a, b) => a - b,
    );
    this.p = terms.length + Math.max(0, this.distinct.length - 1);
    this.blockOfRun = blocks;
    this.keptRows = kept.map(({ coded, block }) => this.rowOf(coded, block));
    this.moments = criterion === 'I' ? this.momentsWithBlocks() : null;
  }

  private momentsWithBlocks(): Float64Array {
    const q = this.options.terms.length;
    const own = regionMoments(this.region, this.options.terms);
    const out = new Float64Array(this.p * this.p);
    for (let i = 0; i < q; i++) for (let j = 0; j < q; j++) out[i * this.p + j] = own[i * q + j]!;
    return out;
  }

  private rowOf(coded: readonly number[], block: number): Float64Array {
    const { terms } = this.options;
    const row = new Float64Array(this.p);
    terms.forEach((term, j) => (row[j] = termValue(this.region.factors, term, coded)));
    for (let c = 0; c + 1 < this.distinct.length; c++)
      row[terms.length + c] = blockContrast(block, this.distinct, c);
    return row;
  }

  private codedAt(places: Int32Array): number[] {
    return Array.from(places, (place, i) => this.region.axes[i]!.coded[place]!);
  }

  private valuesAt(places: Int32Array): number[] {
    return Array.from(places, (place, i) => this.region.axes[i]!.values[place]!);
  }

  private draw(random: Random): Int32Array {
    for (let tries = 0; tries < MAX_DRAWS; tries++) {
      const places = Int32Array.from(this.region.axes, ({ values }) => random.below(values.length));
      if (isInside(this.region, this.valuesAt(places))) return places;
    }
    throw new StatsError(
      'no-feasible-point',
      'The limits leave almost no settable combination in these ranges. Widen a range or check the limits.',
    );
  }

  private inverse(rows: readonly Float64Array[], ridge: number): Float64Array | null {
    const gram = gramOf([...this.keptRows, ...rows], this.p);
    for (let j = 0; j < this.p; j++) gram[j * this.p + j]! += ridge;
    const l = cholesky(gram, this.p);
    return l ? inverseOf(l, this.p) : null;
  }

  /** The criterion as something to maximise; null when the runs do not carry the model. */
  private score(rows: readonly Float64Array[]): number | null {
    const all = [...this.keptRows, ...rows];
    const l = cholesky(gramOf(all, this.p), this.p);
    if (!l) return null;
    if (!this.moments) return lnDeterminant(l, this.p);
    const inverse = inverseOf(l, this.p);
    return -all.length * inverse.reduce((sum, value, i) => sum + value * this.moments![i]!, 0);
  }

  /** D M D for the I criterion, with D the inverse. */
  private sandwich(inverse: Float64Array): Float64Array | null {
    if (!this.moments) return null;
    const { p } = this;
    const half = new Float64Array(p * p);
    const out = new Float64Array(p * p);
    for (let i = 0; i < p; i++)
      for (let j = 0; j < p; j++) {
        let sum = 0;
        for (let k = 0; k < p; k++) sum += inverse[i * p + k]! * this.moments[k * p + j]!;
        half[i * p + j] = sum;
      }
    for (let i = 0; i < p; i++)
      for (let j = 0; j < p; j++) {
        let sum = 0;
        for (let k = 0; k < p; k++) sum += half[i * p + k]! * inverse[k * p + j]!;
        out[i * p + j] = sum;
      }
    return out;
  }

  /** What exchanging one row for another gains: ln of the ratio of determinants, or the fall of the trace. */
  private gain(
    inverse: Float64Array,
    sandwich: Float64Array | null,
    before: Float64Array,
    after: Float64Array,
  ): number {
    const dn = bilinear(inverse, after, after);
    const dOld = bilinear(inverse, before, before);
    const cross = bilinear(inverse, after, before);
    const ratio = (1 + dn) * (1 - dOld) + cross * cross;
    if (!sandwich) return ratio > 0 ? Math.log(ratio) : -Infinity;
    if (ratio <= WORTH_IT) return -Infinity;
    // Woodbury for adding `after` and taking `before` out
    const [s11, s12, s22] = [1 + dn, cross, dOld - 1];
    const determinant = s11 * s22 - s12 * s12;
    const a11 = bilinear(sandwich, after, after);
    const a12 = bilinear(sandwich, after, before);
    const a22 = bilinear(sandwich, before, before);
    return (s22 * a11 - 2 * s12 * a12 + s11 * a22) / determinant;
  }

  /** The best value of one coordinate of one run, or −1 when it stands best. */
  private bestPlace(
    places: Int32Array,
    factor: number,
    row: Float64Array,
    at: { block: number; inverse: Float64Array; sandwich: Float64Array | null },
  ): number {
    const here = places[factor]!;
    let best = -1;
    let most = WORTH_IT;
    for (let place = 0; place < this.region.axes[factor]!.values.length; place++) {
      if (place === here) continue;
      places[factor] = place;
      if (!isInside(this.region, this.valuesAt(places))) continue;
      const candidate = this.rowOf(this.codedAt(places), at.block);
      const gain = this.gain(at.inverse, at.sandwich, row, candidate);
      if (gain > most) {
        most = gain;
        best = place;
      }
    }
    places[factor] = here;
    return best;
  }

  /** Passes over all coordinates until nothing is gained. */
  private improve(design: Int32Array[]): Float64Array[] {
    const rows = design.map((places, r) => this.rowOf(this.codedAt(places), this.blockOfRun[r]!));
    for (let pass = 0; pass < MAX_PASSES; pass++) {
      let isBetter = false;
      for (let r = 0; r < design.length; r++)
        for (let factor = 0; factor < this.region.axes.length; factor++) {
          const inverse = this.inverse(rows, RIDGE);
          if (!inverse) return rows;
          const at = { block: this.blockOfRun[r]!, inverse, sandwich: this.sandwich(inverse) };
          const place = this.bestPlace(design[r]!, factor, rows[r]!, at);
          if (place < 0) continue;
          design[r]![factor] = place;
          rows[r] = this.rowOf(this.codedAt(design[r]!), at.block);
          isBetter = true;
        }
      if (!isBetter) break;
    }
    return rows;
  }

  run(): OptimalDesign | null {
    const { seed, starts = STARTS, count } = this.options;
    let best: OptimalDesign | null = null;
    for (let start = 0; start < starts; start++) {
      const random = seeded(seed, `optimal start ${start}`);
      const design = Array.from({ length: count }, () => this.draw(random));
      const first = this.score(
        design.map((places, r) => this.rowOf(this.codedAt(places), this.blockOfRun[r]!)),
      );
      const value = this.score(this.improve(design));
      if (value === null || (best && value <= best.value)) continue;
      best = {
        points: design.map((places) => this.codedAt(places)),
        value,
        startValue: first ?? -Infinity,
      };
    }
    return best;
  }
}

/**
 * An exact D- or I-optimal design on the settable lattice inside the constraints, by coordinate exchange
 * from many seeded starts; runs that are kept and blocks count along.
 *
 * @throws StatsError `too-few-runs` when runs and kept runs are fewer than the terms; `aliased` when no
 *   start carries the model; `no-feasible-point`.
 * @see Meyer & Nachtsheim (1995), Technometrics 37: 60–69; Fedorov (1972).
 */
export function optimalDesign(region: Region, options: OptimalOptions): OptimalDesign {
  const { terms, count, kept, blocks } = options;
  const blockColumns = new Set([...blocks, ...kept.map(({ block }) => block)]).size - 1;
  const p = terms.length + Math.max(0, blockColumns);
  if (count + kept.length < p)
    throw new StatsError(
      'too-few-runs',
      `This model has ${p} terms with intercept and blocks; ${count + kept.length} runs cannot carry it. Take at least ${p}.`,
      { runs: count + kept.length, terms: p },
    );
  const best = new Exchange(region, options).run();
  if (best) return best;
  const fixed = region.factors.filter(
    (factor, i) => !isCategorical(factor) && region.axes[i]!.values.length < 3,
  );
  throw new StatsError(
    'aliased',
    fixed.length > 0
      ? `${fixed.map(({ key }) => key).join(', ')} ${fixed.length > 1 ? 'have' : 'has'} fewer than three settable values here, so its square cannot be estimated. Widen the range or drop the square.`
      : 'The settable combinations in these limits cannot separate all terms of the model. Widen a range or take a smaller model.',
  );
}
