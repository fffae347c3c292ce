import { cholesky } from '../linalg/cholesky';
import { chiSquareDeviate, seeded, type Random } from '../random/random';
import { crossProducts, seeminglyUnrelated } from './seeminglyUnrelated';

/** One modelled response on the analysed scale, as the joint uncertainty needs it. */
export interface JointResponse {
  /** n × p rows with blocks, and values, of the runs used; `keys` name the runs. */
  readonly rows: readonly Float64Array[];
  readonly z: readonly number[];
  readonly keys: readonly string[];
  readonly names: readonly string[];
  readonly residuals: readonly number[];
  readonly residualSd: number | null;
  readonly df: number;
  /** Whether any run carries a weight other than 1. */
  readonly isWeighted: boolean;
}

export type JointKind = 'matrix-t' | 'seemingly-unrelated' | 'independent';

/** Draws of one new run of all responses, made once and used at every setting (common random numbers). */
export interface JointDraws {
  readonly kind: JointKind;
  /**
   * Counts the draws in which `holds` is true for all responses.
   *
   * @param means predicted means; @param leverages x'(X'X)⁻¹x of each response; @param rows model rows
   *   with blocks at their mean; all at the setting.
   */
  readonly count: (
    at: {
      readonly means: ArrayLike<number>;
      readonly leverages: ArrayLike<number>;
      readonly rows: readonly Float64Array[];
    },
    holds: (response: number, z: number) => boolean,
  ) => number;
}

const sameList = (a: readonly string[], b: readonly string[]) =>
  a.length === b.length && a.every((each, i) => each === b[i]);

/** Draws by one deviation for each response, the same at every setting but for √(1 + leverage). */
function scaledDraws(kind: JointKind, deviations: readonly Float64Array[]): JointDraws {
  return {
    kind,
    count({ means, leverages }, holds) {
      const m = means.length;
      const scale = Array.from({ length: m }, (_, r) => Math.sqrt(1 + Math.max(0, leverages[r]!)));
      let hits = 0;
      for (const deviation of deviations) {
        let all = true;
        for (let r = 0; r < m && all; r++) all = holds(r, means[r]! + scale[r]! * deviation[r]!);
        if (all) hits++;
      }
      return hits;
    },
  };
}

/**
 * One model matrix for all: the predictive is a multivariate t with n − p − m + 1 degrees of freedom
 * (normal–inverse-Wishart with a flat prior).
 *
 * @see Zellner (1971), An Introduction to Bayesian Inference in Econometrics, §8; Peterson (2004), J.
 *   Quality Technology 36: 139–153.
 */
function matrixT(
  responses: readonly JointResponse[],
  draws: number,
  random: Random,
): JointDraws | null {
  const [first] = responses;
  if (!first) return null;
  const isShared = responses.every(
    (each) =>
      sameList(each.keys, first.keys) && sameList(each.names, first.names) && !each.isWeighted,
  );
  const m = responses.length;
  const df = first.rows.length - first.names.length - m + 1;
  if (!isShared || df <= 0) return null;
  const s = crossProducts(responses.map(({ residuals }) => residuals)).map((each) => each / df);
  const l = cholesky(s, m);
  if (!l) return null;
  const deviations = Array.from({ length: draws }, () => {
    const z = Float64Array.from({ length: m }, () => random.normal());
    const scale = Math.sqrt(df / chiSquareDeviate(df, random));
    return Float64Array.from({ length: m }, (_, r) => {
      let sum = 0;
      for (let c = 0; c <= r; c++) sum += l[r * m + c]! * z[c]!;
      return sum * scale;
    });
  });
  return scaledDraws('matrix-t', deviations);
}

/** Each response by itself: Student's t with its own degrees of freedom. */
function independent(
  responses: readonly JointResponse[],
  draws: number,
  random: Random,
): JointDraws {
  const deviations = Array.from({ length: draws }, () =>
    Float64Array.from(responses, ({ residualSd, df }) => {
      if (residualSd === null || df <= 0) return 0;
      return (residualSd * random.normal()) / Math.sqrt(chiSquareDeviate(df, random) / df);
    }),
  );
  return scaledDraws('independent', deviations);
}

/** The joint uncertainty of all modelled responses, by the best method that the runs allow. */
export function jointDraws(
  responses: readonly JointResponse[],
  draws: number,
  seed: number,
): JointDraws {
  const random = seeded(seed, 'joint');
  return (
    matrixT(responses, draws, random) ??
    seeminglyUnrelated(responses, draws, random) ??
    independent(responses, draws, random)
  );
}
