import { sieveAnswer } from '@shared/calc/sieve';
import type { SieveAnswer } from '@shared/schemas/calc/sieve';
import type { BriefJson } from '@shared/schemas/study';
import { readNumber } from '@shared/text/readNumber';
import type { RunForm } from './runForm';

const valueOf = (typed: string): number | null => {
  const reading = readNumber(typed, 'g');
  return reading.kind === 'number' && reading.value >= 0 ? reading.value : null;
};

/** The balances and the curve as they stand while typing; null until a feed and a sieve can be read. */
export function liveSieve(form: RunForm, brief: BriefJson): SieveAnswer | null {
  const feedMassG = valueOf(form.feed);
  const beforeSievingG = valueOf(form.beforeSieving);
  const sieves = Object.entries(form.sieves).flatMap(([mm, typed]) => {
    const retainedG = valueOf(typed);
    return mm === '0' || retainedG === null ? [] : [{ apertureMm: Number(mm), retainedG }];
  });
  const isComplete = Object.values(form.sieves).every((typed) => valueOf(typed) !== null);
  if (feedMassG === null || feedMassG <= 0 || sieves.length === 0) return null;
  const answer = sieveAnswer({
    feedMassG,
    ...(beforeSievingG === null ? {} : { beforeSievingG }),
    sieves,
    panG: valueOf(form.sieves['0'] ?? '') ?? 0,
    passingAt: brief.responses.flatMap(({ apertureMm }) => apertureMm ?? []),
    percentiles: [80, 50],
    interpolation: 'logSize',
  });
  // half a stack is no loss: the sieving balance waits for the last row
  return isComplete
    ? answer
    : { ...answer, shape: [], balance: { ...answer.balance, sieving: null } };
}
