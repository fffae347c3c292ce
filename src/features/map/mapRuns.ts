import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence, ModelledRun } from '@shared/study/requests';
import { deliveredSetting } from '@shared/study/results';
import type { MapRun } from '@/charts/map/mapInput';
import { isOnSlice, type MapModel } from './mapModel';

/** What a run left over, in run-to-run spreads; 0 where the model did not judge it. */
export function residualShareOf({ answer }: MapModel, run: ModelledRun): number {
  const diagnosis = answer.diagnostics.find(({ id }) => String(id) === String(run.number));
  return diagnosis?.studentizedInternal ?? 0;
}

/** The recorded runs of a response as the map shows them, where they were delivered. */
export function runsOnMap(
  evidence: Evidence & { readonly runs: readonly ModelledRun[] },
  model: MapModel,
  axes: readonly [SetPointKey, SetPointKey],
  setting: SettingJson,
): MapRun[] {
  const { key } = model.response;
  return evidence.runs
    .filter(({ status, results }) => status === 'recorded' && (results[key] ?? null) !== null)
    .map((run) => {
      const delivered = deliveredSetting(run.settings, run.actual);
      return {
        id: run.number,
        x: delivered[axes[0]],
        y: delivered[axes[1]],
        residualShare: residualShareOf(model, run),
        onSlice: isOnSlice(evidence, axes, run, setting),
      };
    });
}
