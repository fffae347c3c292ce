import type { Stage } from '../schemas/stage';

/** The counts from which a study's stage follows. */
export interface StageFacts {
  readonly hasBrief: boolean;
  readonly isFrozen: boolean;
  /** Runs that wait for the bench. */
  readonly runsOpen: number;
  readonly modelsKept: number;
  readonly modelsNeeded: number;
  readonly candidates: number;
  readonly isReleased: boolean;
}

/**
 * The stage that a study stands at. It is derived, so it cannot disagree with the records: added runs
 * send a study back to the Bench, a voided run that is repeated too.
 */
export function stageOf(facts: StageFacts): Stage {
  if (facts.isReleased) return 'release';
  if (!facts.hasBrief) return 'brief';
  if (!facts.isFrozen) return 'matrix';
  if (facts.runsOpen > 0) return 'bench';
  if (facts.modelsKept < facts.modelsNeeded) return 'fit';
  return facts.candidates === 0 ? 'map' : 'release';
}
