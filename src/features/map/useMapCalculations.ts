import { fitRequestSchema } from '@shared/schemas/calc/fit';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import { constraintsOf, variedSettings } from '@shared/study/plan';
import { chooseRequestOf, fitRequestOf, type Evidence } from '@shared/study/requests';
import { useQueries, useQuery } from '@tanstack/react-query';
import type { Axes } from '@/charts/grid';
import { calculation } from '@/engine/engine';
import { rangeOf } from './mapGrid';
import type { MapModel } from './mapModel';

/** The surface of every model over the lattice, in the order of the models. */
export function useSurfaces(
  evidence: Evidence,
  models: readonly MapModel[],
  [xKey, yKey]: readonly [SetPointKey, SetPointKey],
  { grid, slice }: { readonly grid: Axes; readonly slice: SettingJson },
) {
  const { brief, envelope } = evidence;
  // the axes are swept: only the others decide the slice
  const at = Object.fromEntries(
    brief.factors.map(({ key }) => [
      key,
      key === xKey || key === yKey ? rangeOf(evidence, key)[0] : slice[key],
    ]),
  );
  return useQueries({
    queries: models.map(({ response, fit }) =>
      calculation('surface', {
        fit: fitRequestSchema.parse(fitRequestOf(evidence, response, fit)),
        constraints: constraintsOf(brief, envelope),
        x: { key: xKey, values: grid.x },
        y: { key: yKey, values: grid.y },
        at,
      }),
    ),
  });
}

/** How often all goals would hold at one setting. */
export function useChance(evidence: Evidence, models: readonly MapModel[], slice: SettingJson) {
  const choices = Object.fromEntries(models.map(({ response, fit }) => [response.key, fit]));
  const request = chooseRequestOf(evidence, choices);
  const { data } = useQuery(
    calculation('choose', {
      ...request,
      fixed: { ...request.fixed, ...variedSettings(evidence.brief, slice) },
      support: 'region',
      top: 1,
    }),
  );
  return data?.best[0] ?? null;
}
