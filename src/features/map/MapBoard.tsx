import type { RunJson } from '@shared/schemas/run';
import { setPointOf, type SettingJson, type SetPointKey } from '@shared/schemas/setPoint';
import { snap } from '@shared/stats/coding/snap';
import { constraintsOf } from '@shared/study/plan';
import type { Evidence } from '@shared/study/requests';
import { useDeferredValue, useState } from 'react';
import type { MapMove } from '@/charts/map/mapKeys';
import type { MapInput } from '@/charts/map/mapInput';
import { Notice } from '@/components/Notice';
import { Segments } from '@/components/Segments';
import { LoadingState } from '@/components/states';
import { formatNumber, formatPlain, withUnit } from '@/lib/format';
import { exactGoals, modelledGoals } from './goalLines';
import { heldWords, latticeOf, limitName, rangeOf, sectionEnds } from './mapGrid';
import {
  axisWords,
  dialOf,
  limitsOf,
  mapAxes,
  middleSetting,
  numericFactors,
  predictionAt,
  type MapModel,
} from './mapModel';
import { MapPanel } from './MapPanel';
import { runsOnMap } from './mapRuns';
import { SectionPanel, type SectionWay } from './SectionPanel';
import { SetPointPanel } from './SetPointPanel';
import { useChance, useSurfaces } from './useMapCalculations';

interface MapBoardProps {
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly models: readonly MapModel[];
}

const NEXT_WAY: Readonly<Record<SectionWay, SectionWay>> = {
  slanted: 'across',
  across: 'up',
  up: 'slanted',
};

const settingWords = (keys: readonly SetPointKey[], setting: SettingJson) =>
  keys.map((key) => withUnit(formatPlain(setting[key]), setPointOf(key).unit)).join(', ');

/** One scale for each response, wide enough for its runs and limits. */
function scalesOf({ brief, runs }: MapBoardProps['evidence']) {
  return Object.fromEntries(
    brief.responses.map((response) => {
      const values = runs.flatMap(({ results }) => results[response.key] ?? []);
      const all = [...values, ...limitsOf(response).map(({ value }) => value)];
      const [low, high] = [Math.min(...all), Math.max(...all)];
      const pad = 0.1 * (high - low || 1);
      return [response.key, [low - pad, high + pad] as const];
    }),
  );
}

/** The set-point and what moves it: a step of a dial, or a place on the map. */
function useSetting(evidence: Evidence) {
  const [setting, setSetting] = useState<SettingJson>(() => middleSetting(evidence));
  const move = (key: SetPointKey, by: number) => {
    const values = dialOf(evidence, key);
    const wished = values.indexOf(setting[key]) + by;
    const next = values[Math.max(0, Math.min(values.length - 1, wished))];
    if (next !== undefined) setSetting((was) => ({ ...was, [key]: next }));
  };
  const place = (key: SetPointKey, value: number) => {
    const [low, high] = rangeOf(evidence, key);
    const inside = Math.max(low, Math.min(high, value));
    const factor = numericFactors(evidence).find((each) => each.key === key);
    setSetting((was) => ({ ...was, [key]: factor ? snap(factor, inside) : inside }));
  };
  return { setting, setSetting, move, place };
}

/** The map is the hero: one response over two set-points, with everything that limits it. */
export function MapBoard({ evidence, models }: MapBoardProps) {
  const { brief, runs } = evidence;
  const [shown, setShown] = useState(models[0]?.response.key ?? '');
  const [way, setWay] = useState<SectionWay>('slanted');
  const { setting, setSetting, move, place } = useSetting(evidence);
  const slice = useDeferredValue(setting);
  const axes = mapAxes(evidence);
  const [xKey, yKey] = axes;
  const [xLow, xHigh] = rangeOf(evidence, xKey);
  const [yLow, yHigh] = rangeOf(evidence, yKey);
  const grid = latticeOf([xLow, xHigh], [yLow, yHigh]);
  const surfaces = useSurfaces(evidence, models, axes, { grid, slice });
  const chance = useChance(evidence, models, slice);
  const at = Math.max(
    0,
    models.findIndex(({ response }) => response.key === shown),
  );
  const model = models[at];
  if (!model) return null;
  const { response } = model;
  const surface = surfaces[at]?.data;
  const failure = surfaces.find(({ error }) => error)?.error;
  const others = brief.factors.map(({ key }) => key).filter((key) => !axes.includes(key));
  const ends = sectionEnds(way, [xLow, xHigh], [yLow, yHigh], [setting[xKey], setting[yKey]]);
  const limitNames = constraintsOf(brief, evidence.envelope).map(limitName(evidence.envelope));
  const axis = (key: SetPointKey) => ({ label: axisWords(key).name, unit: axisWords(key).unit });
  const map: MapInput | null = surface
    ? {
        x: { ...axis(xKey), values: grid.x },
        y: { ...axis(yKey), values: grid.y },
        z: surface.predicted,
        unit: response.unit,
        limits: surface.slack.map((margin, i) => ({
          label: limitNames[i] ?? '',
          // on a phone the figure alone
          shortLabel: (limitNames[i] ?? '').replace(/^\D+/, ''),
          margin,
        })),
        support: surface.spread,
        runs: runsOnMap(evidence, model, axes, setting),
        goals: [
          ...modelledGoals(
            models,
            surfaces.map(({ data }) => data?.predicted ?? null),
            response.key,
          ),
          ...exactGoals(evidence, axes, grid, slice),
        ],
        setPoint: { x: setting[xKey], y: setting[yKey] },
        section: {
          from: { x: ends[0][0], y: ends[0][1] },
          to: { x: ends[1][0], y: ends[1][1] },
        },
      }
    : null;
  const { predicted } = predictionAt(model, evidence, setting);
  const onMoved = ({ dx, dy, dz }: MapMove) => {
    if (dx !== 0) move(xKey, dx);
    if (dy !== 0) move(yKey, dy);
    if (dz !== 0 && others[0]) move(others[0], dz);
  };
  return (
    <div className="grid gap-4 desk:grid-cols-[minmax(0,1fr)_23rem] items-start">
      <div className="grid gap-4 min-w-0">
        <MapPanel
          response={response}
          map={map}
          isFeasible={surface?.feasible ?? []}
          reading={`${settingWords([yKey, xKey], setting)}: ${withUnit(formatNumber(predicted, 1), response.unit)}`}
          fact={`over ${axisWords(xKey).name.toLowerCase()} and ${axisWords(yKey).name.toLowerCase()}${others.length > 0 ? ` at ${others.map(heldWords(setting)).join(', ')}` : ''}`}
          control={
            models.length > 1 && (
              <Segments
                label="Response on the map"
                value={response.key}
                options={models.map((each) => ({
                  value: each.response.key,
                  label: each.response.name,
                }))}
                onChange={setShown}
              />
            )
          }
          onMoved={onMoved}
          onPlaced={({ x, y }) => {
            place(xKey, x);
            place(yKey, y);
          }}
          onSwung={() => setWay(NEXT_WAY[way])}
        >
          {failure && <Notice tone="stop">{failure.message}</Notice>}
          {!surface && !failure && <LoadingState what="Drawing the map." />}
        </MapPanel>
        <SectionPanel
          evidence={evidence}
          model={model}
          axes={axes}
          ends={ends}
          setting={setting}
          runs={runs}
          way={way}
          onWay={setWay}
        />
      </div>
      <SetPointPanel
        evidence={evidence}
        models={models}
        setting={setting}
        chance={chance}
        scales={scalesOf(evidence)}
        onChange={setSetting}
      />
    </div>
  );
}
