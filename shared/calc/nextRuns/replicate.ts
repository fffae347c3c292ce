import { replicateKeys } from '../../stats/fit/anova';
import type { NextBasis, NextRuns } from './basis';

/** Runs to repeat: those that say most about the model and were not repeated yet, each once. */
export function replicate({ request, model, used }: NextBasis): NextRuns {
  const keys = replicateKeys(model.columns);
  const countOf = (key: string) => keys.filter((each) => each === key).length;
  const distinct = [...new Set(keys)];
  const before = keys.length - distinct.length;
  const ranked = distinct
    .map((key) => {
      const i = keys.indexOf(key);
      return { key, i, times: countOf(key), leverage: model.fit.leverages[i]! };
    })
    .sort((a, b) => a.times - b.times || b.leverage - a.leverage || a.i - b.i);
  const settings = Array.from(
    { length: request.count },
    (_, i) => used[ranked[i % ranked.length]!.i]!.settings,
  );
  return {
    settings,
    why: `Repeating ${request.count} settings where single runs weigh most shows how far two equal runs differ; that is what lack of fit is judged by.`,
    gain: { pureErrorDfBefore: before, pureErrorDfAfter: before + request.count },
    warnings: [],
  };
}
