import type { FitAnswer } from '@shared/schemas/calc/fit';
import { termSymbol } from '@/lib/termSymbol';
import { formatNumber, formatP, formatSignificant } from '@/lib/format';

interface Reading {
  readonly tone: 'holds' | 'careful' | 'open';
  readonly words: string;
}

const percent = (share: number | null) =>
  share === null ? '—' : `${formatNumber(100 * share, 0)} %`;

function trust({ summary, reason }: FitAnswer): Reading {
  if (reason !== null) return { tone: 'open', words: reason };
  const predicted = summary.predictedRSquared;
  if (predicted === null)
    return {
      tone: 'careful',
      words: 'One run is fitted exactly, so new runs cannot be foretold from the others.',
    };
  if (predicted > 0.7)
    return {
      tone: 'holds',
      words: `Left-out runs are foretold well: predicted R² ${percent(predicted)}, against ${percent(summary.rSquared)} for the runs that were fitted.`,
    };
  return {
    tone: 'careful',
    words:
      predicted > 0
        ? `Left-out runs are foretold only in part: predicted R² ${percent(predicted)}. Fewer terms, a narrower range or more runs would help.`
        : 'Left-out runs are foretold no better than by their mean: do not choose settings by this model.',
  };
}

function lackOfFit({ anova }: FitAnswer): Reading {
  const { lackOfFit: lack, pureError } = anova;
  if (!lack || lack.p === null)
    return {
      tone: 'open',
      words: pureError
        ? 'No run is left to judge the form of the model by.'
        : 'No setting was repeated, so lack of fit cannot be judged: replicate a few runs.',
    };
  if (lack.p < 0.05)
    return {
      tone: 'careful',
      words: `The model misses the runs by more than repeats scatter (lack of fit p = ${formatP(lack.p)}). Try a transformation or another term; also look whether the repeats are unusually alike.`,
    };
  return {
    tone: 'holds',
    words: `The model misses the runs by no more than repeats scatter (lack of fit p = ${formatP(lack.p)}, ${pureError?.df ?? 0} degrees of freedom of pure error).`,
  };
}

function influence({ diagnostics }: FitAnswer): Reading | null {
  const strongest = [...diagnostics].sort(
    (a, b) => (b.cooksDistance ?? 0) - (a.cooksDistance ?? 0),
  )[0];
  if (!strongest || (strongest.cooksDistance ?? 0) < 0.5) return null;
  return {
    tone: 'careful',
    words: `Run ${strongest.id} pulls the model (Cook’s distance ${formatNumber(strongest.cooksDistance, 2)}): look at its record before trusting the terms it feeds.`,
  };
}

function strongest({ terms }: FitAnswer): Reading | null {
  const own = terms.filter(
    ({ term, t }) => term !== 'intercept' && !term.startsWith('block') && t !== null,
  );
  const found = own
    .filter(({ p }) => (p ?? 1) < 0.05)
    .sort((a, b) => Math.abs(b.t ?? 0) - Math.abs(a.t ?? 0));
  if (own.length === 0) return null;
  if (found.length === 0) return { tone: 'open', words: 'No term stands out from the scatter.' };
  return {
    tone: 'holds',
    words: `Strongest: ${found
      .slice(0, 4)
      .map(
        ({ term, estimate }) =>
          `${termSymbol(term)} (${estimate > 0 ? '+' : ''}${formatSignificant(estimate)})`,
      )
      .join(', ')}; from the middle to the end of a range, on the analysed scale.`,
  };
}

function surface({ canonical }: FitAnswer): Reading | null {
  if (!canonical) return null;
  const where = canonical.inRegion ? 'inside the ranges' : 'outside the ranges';
  const names = { maximum: 'a peak', minimum: 'a trough', saddle: 'a saddle', ridge: 'a ridge' };
  return {
    tone: 'holds',
    words: `The surface has ${names[canonical.nature]} ${where}.`,
  };
}

/** What the numbers mean, in sentences. */
export function readingOf(answer: FitAnswer): Reading[] {
  return [
    trust(answer),
    lackOfFit(answer),
    strongest(answer),
    surface(answer),
    influence(answer),
  ].filter((each): each is Reading => each !== null);
}
