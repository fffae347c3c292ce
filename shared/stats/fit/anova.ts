import { fUpper } from '../distributions/tails';
import {
  DD_ZERO,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddSubtract,
  toNumber,
  type Dd,
} from '../linalg/dd';
import { ddGet } from '../linalg/ddMatrix';
import { INTERCEPT } from '../model/term';
import type { CodedColumns } from './codedColumns';
import type { LeastSquares } from './leastSquares';

export interface AnovaLine {
  readonly df: number;
  readonly ss: number;
  readonly ms: number | null;
  readonly f: number | null;
  readonly p: number | null;
}

export interface Anova {
  readonly block: AnovaLine | null;
  readonly model: AnovaLine;
  readonly residual: AnovaLine;
  readonly lackOfFit: AnovaLine | null;
  readonly pureError: AnovaLine | null;
  readonly total: AnovaLine;
  readonly sequential: readonly (AnovaLine & { term: string })[];
  readonly partial: readonly (AnovaLine & { term: string })[];
}

interface Error {
  readonly df: number;
  readonly ms: number | null;
}

function line(df: number, ss: number, error: Error | null): AnovaLine {
  const ms = df > 0 ? ss / df : null;
  if (ms === null || !error?.ms || error.df <= 0) return { df, ss, ms, f: null, p: null };
  const f = ms / error.ms;
  return { df, ss, ms, f, p: fUpper(f, df, error.df) };
}

const plain = (df: number, ss: number): AnovaLine => line(df, ss, null);
const sum = (values: readonly Dd[]) =>
  values.reduce<Dd>((total, each) => ddAdd(total, each), DD_ZERO);

const isBlock = (name: string) => name.startsWith('block[');

/** Columns that belong to one line of the table: all blocks together, each term by itself. */
function groupsOf(names: readonly string[]): { term: string; columns: number[] }[] {
  const groups: { term: string; columns: number[] }[] = [];
  names.forEach((name, j) => {
    if (name === INTERCEPT) return;
    const term = isBlock(name) ? 'block' : name;
    const last = groups.at(-1);
    if (last?.term === term) last.columns.push(j);
    else groups.push({ term, columns: [j] });
  });
  return groups;
}

/** bᵀ C⁻¹ b for the columns of one group: its sum of squares given all others. */
function partialSs(fit: LeastSquares, columns: readonly number[]): number {
  const m = columns.length;
  const a = columns.map((i) => columns.map((j) => ddGet(fit.inverse, i, j)));
  const b = columns.map((j) => fit.coefficients[j]!);
  const z = [...b];
  // Gaussian elimination: the block of an inverse Gram matrix is positive definite
  for (let k = 0; k < m; k++)
    for (let i = k + 1; i < m; i++) {
      const factor = ddDivide(a[i]![k]!, a[k]![k]!);
      for (let j = k; j < m; j++) a[i]![j] = ddSubtract(a[i]![j]!, ddMultiply(factor, a[k]![j]!));
      z[i] = ddSubtract(z[i]!, ddMultiply(factor, z[k]!));
    }
  for (let i = m - 1; i >= 0; i--) {
    for (let j = i + 1; j < m; j++) z[i] = ddSubtract(z[i]!, ddMultiply(a[i]![j]!, z[j]!));
    z[i] = ddDivide(z[i]!, a[i]![i]!);
  }
  return toNumber(sum(z.map((each, i) => ddMultiply(each, b[i]!))));
}

/** Runs with identical rows of the model matrix, blocks included: one key each. */
export function replicateKeys({ x, rootWeights }: CodedColumns): string[] {
  return Array.from({ length: x.rows }, (_, i) =>
    Array.from({ length: x.cols }, (_unused, j) =>
      (toNumber(ddDivide(ddGet(x, i, j), rootWeights[i]!)) + 0).toPrecision(13),
    ).join(' '),
  );
}

/** Scatter within identical rows: sum of squares about their weighted means, and its degrees of freedom. */
function pureError(columns: CodedColumns, y: readonly number[]): { df: number; ss: number } {
  const groups = new Map<string, number[]>();
  replicateKeys(columns).forEach((key, i) => groups.set(key, [...(groups.get(key) ?? []), i]));
  let df = 0;
  let ss = DD_ZERO;
  for (const members of groups.values()) {
    if (members.length < 2) continue;
    df += members.length - 1;
    const weights = members.map((i) =>
      ddMultiply(columns.rootWeights[i]!, columns.rootWeights[i]!),
    );
    const mean = ddDivide(
      sum(members.map((i, k) => ddMultiply(weights[k]!, dd(y[i]!)))),
      sum(weights),
    );
    members.forEach((i, k) => {
      const off = ddSubtract(dd(y[i]!), mean);
      ss = ddAdd(ss, ddMultiply(weights[k]!, ddMultiply(off, off)));
    });
  }
  return { df, ss: toNumber(ss) };
}

/**
 * Analysis of variance: blocks first, then the terms in order; each term also given all others; pure
 * error from runs with identical fitted rows, lack of fit as the rest. F tests are against the residual,
 * lack of fit against pure error.
 *
 * @see Draper & Smith (1998), Applied Regression Analysis, 3rd ed., ch. 2 and 6.
 */
export function anovaOf(columns: CodedColumns, y: readonly number[], fit: LeastSquares): Anova {
  const { names } = columns;
  const hasIntercept = names[0] === INTERCEPT;
  const dfResidual = fit.n - fit.p;
  const ssResidual = toNumber(fit.residualSs);
  const error: Error = { df: dfResidual, ms: dfResidual > 0 ? ssResidual / dfResidual : null };
  const groups = groupsOf(names);
  const ssOf = (columnsOf: readonly number[]) =>
    toNumber(sum(columnsOf.map((j) => fit.effectSs[j]!)));
  const blockColumns = groups.find(({ term }) => term === 'block')?.columns ?? [];
  const termColumns = groups
    .filter(({ term }) => term !== 'block')
    .flatMap((group) => group.columns);
  const pure = pureError(columns, y);
  const lackDf = dfResidual - pure.df;
  const hasPure = pure.df > 0 && dfResidual > 0;
  const pureMs = pure.df > 0 ? pure.ss / pure.df : null;
  const lackSs = Math.max(0, ssResidual - pure.ss);
  const all = sum([...fit.effectSs.slice(hasIntercept ? 1 : 0), fit.residualSs]);
  return {
    block: blockColumns.length > 0 ? line(blockColumns.length, ssOf(blockColumns), error) : null,
    model: line(termColumns.length, ssOf(termColumns), error),
    residual: plain(dfResidual, ssResidual),
    lackOfFit: hasPure && lackDf > 0 ? line(lackDf, lackSs, { df: pure.df, ms: pureMs }) : null,
    pureError: hasPure ? plain(pure.df, pure.ss) : null,
    total: plain(fit.n - (hasIntercept ? 1 : 0), toNumber(all)),
    sequential: groups.map(({ term, columns: own }) => ({
      term,
      ...line(own.length, ssOf(own), error),
    })),
    partial: groups.map(({ term, columns: own }) => ({
      term,
      ...line(own.length, partialSs(fit, own), error),
    })),
  };
}
