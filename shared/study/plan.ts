import type { ConstraintInput, FactorInput } from '../schemas/calc/common';
import { erectedCapacitanceNf, type EnvelopeJson } from '../schemas/rig';
import {
  SET_POINT_KEYS,
  setPointOf,
  type SettingJson,
  type SetPointKey,
} from '../schemas/setPoint';
import type { BriefJson } from '../schemas/study';

/** The part of a Brief that a calculation needs. */
export type PlanBasis = Pick<BriefJson, 'factors' | 'fixed'>;

/** The varied set-points as factors: ranges from the Brief, hard limits and steps from the rig. */
export function factorsOf(brief: PlanBasis, envelope: EnvelopeJson): FactorInput[] {
  return brief.factors.map(({ key, low, high, scale }) => {
    const { name, unit } = setPointOf(key);
    const { min, max, step } = envelope[key];
    return { key, name, unit, low, high, min, max, step, scale };
  });
}

/** A full setting from the varied values; the others are held at the Brief's fixed ones. */
export function fullSetting(
  brief: PlanBasis,
  varied: Readonly<Record<string, number | string>>,
): SettingJson {
  const value = (key: SetPointKey): number => {
    const given = varied[key];
    const fixed = brief.fixed[key];
    if (typeof given === 'number') return given;
    if (typeof fixed === 'number') return fixed;
    throw new Error(`The ${key} is neither varied nor held.`);
  };
  return {
    voltage: value('voltage'),
    gap: value('gap'),
    pulses: value('pulses'),
    frequency: value('frequency'),
  };
}

/** The varied part of a full setting, as a calculation takes it. */
export function variedSettings(brief: PlanBasis, setting: SettingJson): Record<string, number> {
  return Object.fromEntries(brief.factors.map(({ key }) => [key, setting[key]]));
}

/** The rig's limits that bind several set-points at once, in kV, mm and Hz. */
function rigLimits(envelope: EnvelopeJson): ConstraintInput[] {
  const { chargingPowerW, fieldMinKvPerMm, fieldMaxKvPerMm } = envelope;
  return [
    // field V/g between its limits, written without a division
    { terms: { voltage: 1, gap: -fieldMaxKvPerMm }, op: '<=', bound: 0 },
    { terms: { voltage: 1, gap: -fieldMinKvPerMm }, op: '>=', bound: 0 },
    // ½CV²·f in watts: C in nF and V in kV give millijoule, hence 0.0005
    {
      terms: { 'voltage^2:frequency': 0.0005 * erectedCapacitanceNf(envelope) },
      op: '<=',
      bound: chargingPowerW,
    },
  ];
}

function powerOf(part: string): { key: string; power: number } {
  const [key = '', power = '1'] = part.split('^');
  return { key, power: Number(power) };
}

/** Puts the held set-points' values into a constraint, so that it speaks of the varied ones alone. */
function substitute(constraint: ConstraintInput, brief: PlanBasis): ConstraintInput {
  const varied = new Set<string>(brief.factors.map(({ key }) => key));
  const terms: Record<string, number> = {};
  let { bound } = constraint;
  for (const [name, coefficient] of Object.entries(constraint.terms)) {
    const parts = name.split(':').map(powerOf);
    const held = parts.filter(({ key }) => !varied.has(key));
    const rest = parts.filter(({ key }) => varied.has(key));
    const factor = held.reduce((product, { key, power }) => {
      const value = SET_POINT_KEYS.find((each) => each === key);
      return product * ((value ? brief.fixed[value] : null) ?? NaN) ** power;
    }, coefficient);
    if (rest.length === 0) bound -= factor;
    else
      terms[rest.map(({ key, power }) => (power === 1 ? key : `${key}^${power}`)).join(':')] =
        factor;
  }
  return { terms, op: constraint.op, bound };
}

/** The rig's limits as constraints on the varied set-points. One without any term left is dropped. */
export function constraintsOf(brief: PlanBasis, envelope: EnvelopeJson): ConstraintInput[] {
  return rigLimits(envelope)
    .map((constraint) => substitute(constraint, brief))
    .filter(({ terms }) => Object.keys(terms).length > 0);
}
