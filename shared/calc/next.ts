import type { NextAnswer, NextRequest } from '../schemas/calc/next';
import { ascent } from './nextRuns/ascent';
import { augment } from './nextRuns/augment';
import { basisOf, presentRuns } from './nextRuns/basis';
import { confirm } from './nextRuns/confirm';
import { improve } from './nextRuns/improve';
import { replicate } from './nextRuns/replicate';

const PURPOSES = { replicate, augment, ascent, improve, confirm };

/**
 * What to run next, for a purpose: `POST /api/calc/next`.
 *
 * @throws StatsError what `fitModel` throws, and `no-feasible-point` or `not-available` of the purpose.
 */
export function nextAnswer(request: NextRequest): NextAnswer {
  const basis = basisOf(request);
  const { settings, ...rest } = PURPOSES[request.purpose](basis);
  return { runs: presentRuns(basis, settings), ...rest };
}
