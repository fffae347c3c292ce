/** The part of jstat in use: summary statistics. Its tails and quantiles are not accurate enough here. */
declare module 'jstat' {
  export const jStat: {
    mean(values: readonly number[]): number;
    median(values: readonly number[]): number;
    sumsqerr(values: readonly number[]): number;
    stdev(values: readonly number[], sample?: boolean): number;
    corrcoeff(a: readonly number[], b: readonly number[]): number;
  };
}
