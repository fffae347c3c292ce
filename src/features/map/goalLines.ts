import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence } from '@shared/study/requests';
import type { GoalLine } from '@/charts/mapScales';
import { formatPlain, withUnit } from '@/lib/format';
import { computedAt, limitsOf, type MapModel } from './mapModel';

type Rows = readonly (readonly number[])[];

/** The limits of modelled responses as lines on the map; those not shown bring their name. */
export function modelledGoals(
  models: readonly MapModel[],
  surfaces: readonly (Rows | null)[],
  shown: string,
): GoalLine[] {
  return models.flatMap(({ response }, i) => {
    const values = surfaces[i];
    if (!values) return [];
    const name = response.key === shown ? '' : `${response.name} `;
    return limitsOf(response).map(({ value, holdsAbove }) => ({
      words: `${name}${withUnit(formatPlain(value), response.unit)}`,
      values,
      level: value,
      holdsAbove,
    }));
  });
}

/** The limits of computed responses (energy, duration): exact lines. */
export function exactGoals(
  evidence: Evidence,
  [xKey, yKey]: readonly [SetPointKey, SetPointKey],
  grid: { readonly x: readonly number[]; readonly y: readonly number[] },
  slice: SettingJson,
): GoalLine[] {
  return evidence.brief.responses.flatMap((response) => {
    if (computedAt(evidence, response, slice) === null) return [];
    const values = grid.y.map((v) =>
      grid.x.map((u) => computedAt(evidence, response, { ...slice, [xKey]: u, [yKey]: v }) ?? 0),
    );
    return limitsOf(response).map(({ value, holdsAbove }) => ({
      words: withUnit(formatPlain(value), response.unit),
      values,
      level: value,
      holdsAbove,
    }));
  });
}
