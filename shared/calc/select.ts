import type { SelectAnswer, SelectRequest } from '../schemas/calc/select';
import { selectTerms } from '../stats/fit/selectTerms';
import { answerOf } from './fit';
import { usedRuns } from './usedRuns';

/** Chooses the terms of one response’s model: `POST /api/calc/select`. */
export function selectAnswer(request: SelectRequest): SelectAnswer {
  const { method, criterion, limit, heredity, ...fit } = request;
  const selection = usedRuns(request.runs);
  const chosen = selectTerms(fit, selection.used, { method, criterion, limit, heredity });
  return {
    best: answerOf({ ...fit, model: [...chosen.terms] }, chosen.model, selection),
    path: chosen.path,
    warnings: [
      {
        code: 'selected',
        message:
          'These terms were chosen on the same runs, so their p values look better than they are.',
      },
    ],
  };
}
