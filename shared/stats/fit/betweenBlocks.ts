import { CholeskyDecomposition, Matrix as MlMatrix } from 'ml-matrix';
import { toNumber } from '../linalg/dd';
import { ddGet } from '../linalg/ddMatrix';
import type { FittedModel, FitRun } from './fitModel';

const LEAST_BLOCKS = 3;
const STEPS = 80;

/** The model matrix without its block columns, and which block each run is in. */
function matricesOf(model: FittedModel, runs: readonly FitRun[]) {
  const kept = model.columns.names.flatMap((name, j) => (name.startsWith('block[') ? [] : [j]));
  const x = runs.map((_, i) => kept.map((j) => toNumber(ddGet(model.columns.x, i, j))));
  return { x: new MlMatrix(x), y: MlMatrix.columnVector([...model.z]) };
}

/** −2 × restricted log-likelihood, up to a constant, at θ = σ²(block)/σ²(run); σ² profiled out. */
function deviance(
  theta: number,
  { x, y }: { x: MlMatrix; y: MlMatrix },
  runs: readonly FitRun[],
): { value: number; variance: number } {
  const n = runs.length;
  const p = x.columns;
  const v = MlMatrix.zeros(n, n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      const same = runs[i]!.block === runs[j]!.block ? theta : 0;
      v.set(i, j, same + (i === j ? 1 / runs[i]!.weight : 0));
    }
  const choleskyV = new CholeskyDecomposition(v);
  const vx = choleskyV.solve(x);
  const vy = choleskyV.solve(y);
  const gram = x.transpose().mmul(vx);
  const choleskyX = new CholeskyDecomposition(gram);
  const beta = choleskyX.solve(x.transpose().mmul(vy));
  const rest = MlMatrix.sub(y, x.mmul(beta));
  const quadratic = rest.transpose().mmul(choleskyV.solve(rest)).get(0, 0);
  const lnDet = (c: CholeskyDecomposition) =>
    2 * c.lowerTriangularMatrix.diagonal().reduce((sum, d) => sum + Math.log(d), 0);
  const variance = quadratic / (n - p);
  return { value: lnDet(choleskyV) + lnDet(choleskyX) + (n - p) * Math.log(variance), variance };
}

/**
 * Between-block standard deviation on the analysed scale by restricted maximum likelihood, from three or
 * more blocks.
 *
 * @returns null with fewer blocks, or when the model uses up the runs.
 * @see Patterson & Thompson (1971), Biometrika 58: 545–554.
 */
export function betweenBlockSd(model: FittedModel, runs: readonly FitRun[]): number | null {
  const blocks = new Set(runs.map(({ block }) => block)).size;
  if (blocks < LEAST_BLOCKS || model.fit.n - model.fit.p < 1 || model.fit.isPerfect) return null;
  const matrices = matricesOf(model, runs);
  const at = (lnTheta: number) => deviance(Math.exp(lnTheta), matrices, runs).value;
  let low = Math.log(1e-6);
  let high = Math.log(1e4);
  const ratio = (Math.sqrt(5) - 1) / 2;
  for (let i = 0; i < STEPS; i++) {
    const a = high - ratio * (high - low);
    const b = low + ratio * (high - low);
    if (at(a) < at(b)) high = b;
    else low = a;
  }
  const theta = Math.exp((low + high) / 2);
  const best = deviance(theta, matrices, runs);
  // at the lower end nothing speaks for a difference between days
  return deviance(0, matrices, runs).value <= best.value ? 0 : Math.sqrt(theta * best.variance);
}
