import type { ResponseJson } from '@shared/schemas/response';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence } from '@shared/study/requests';
import type { Axes, Grid } from '@/charts/grid';
import type { MapGoal } from '@/charts/map/mapInput';
import { formatPlain, withUnit } from '@/lib/format';
import { computedAt, limitsOf } from './mapModel';

const linesOf = (response: ResponseJson, values: Grid, prefix = ''): MapGoal[] =>
  limitsOf(response).map(({ value, holdsAbove }) => ({
    label: `${prefix}${withUnit(formatPlain(value), response.unit)}`,
    values,
    level: value,
    side: holdsAbove ? 'atLeast' : 'atMost',
  }));

/** The goals on modelled responses; those on another response than the one shown carry its name. */
export function modelledGoals(
  surfaces: readonly { readonly response: ResponseJson; readonly values: Grid | undefined }[],
  shown: string,
): MapGoal[] {
  return surfaces.flatMap(({ response, values }) =>
    values ? linesOf(response, values, response.key === shown ? '' : `${response.name} `) : [],
  );
}

/** The goals on what is computed exactly, like the specific energy. */
export function computedGoals(
  evidence: Evidence,
  [xKey, yKey]: readonly [SetPointKey, SetPointKey],
  grid: Axes,
  slice: SettingJson,
): MapGoal[] {
  return evidence.brief.responses.flatMap((response) => {
    if (computedAt(evidence, response, slice) === null) return [];
    const at = (u: number, v: number) =>
      computedAt(evidence, response, { ...slice, [xKey]: u, [yKey]: v }) ?? 0;
    return linesOf(
      response,
      grid.y.map((v) => grid.x.map((u) => at(u, v))),
    );
  });
}
