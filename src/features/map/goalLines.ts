import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence } from '@shared/study/requests';
import type { Axes, Grid } from '@/charts/grid';
import type { MapGoal } from '@/charts/map/mapInput';
import { formatPlain, withUnit } from '@/lib/format';
import { computedAt, limitsOf, type MapModel } from './mapModel';

/** The limits of modelled responses as lines on the map; those not shown bring their name. */
export function modelledGoals(
  models: readonly MapModel[],
  surfaces: readonly (Grid | null)[],
  shown: string,
): MapGoal[] {
  return models.flatMap(({ response }, i) => {
    const values = surfaces[i];
    if (!values) return [];
    const name = response.key === shown ? '' : `${response.name} `;
    return limitsOf(response).map(({ value, holdsAbove }) => ({
      label: `${name}${withUnit(formatPlain(value), response.unit)}`,
      values,
      level: value,
      side: holdsAbove ? 'atLeast' : 'atMost',
    }));
  });
}

/** The limits of computed responses (energy, duration): exact lines. */
export function exactGoals(
  evidence: Evidence,
  [xKey, yKey]: readonly [SetPointKey, SetPointKey],
  grid: Axes,
  slice: SettingJson,
): MapGoal[] {
  return evidence.brief.responses.flatMap((response) => {
    if (computedAt(evidence, response, slice) === null) return [];
    const values = grid.y.map((v) =>
      grid.x.map((u) => computedAt(evidence, response, { ...slice, [xKey]: u, [yKey]: v }) ?? 0),
    );
    return limitsOf(response).map(({ value, holdsAbove }) => ({
      label: withUnit(formatPlain(value), response.unit),
      values,
      level: value,
      side: holdsAbove ? 'atLeast' : 'atMost',
    }));
  });
}
