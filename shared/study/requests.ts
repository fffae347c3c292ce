import type { EnvelopeJson } from '../schemas/rig';
import type { PlanInput } from '../schemas/matrix';
import { constraintsOf, factorsOf, type PlanBasis } from './plan';

/** A plan as /api/calc/design takes it: factors and limits from Brief and rig, always snapped to steps. */
export function designRequestOf(brief: PlanBasis, envelope: EnvelopeJson, plan: PlanInput) {
  return {
    factors: factorsOf(brief, envelope),
    constraints: constraintsOf(brief, envelope),
    region: 'range' as const,
    ...plan,
    randomise: true,
    snap: true,
  };
}
