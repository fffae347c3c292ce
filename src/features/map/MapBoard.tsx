import { fitRequestSchema } from '@shared/schemas/calc/fit';
import type { RunJson } from '@shared/schemas/run';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import { snap } from '@shared/stats/coding/snap';
import { constraintsOf, variedSettings } from '@shared/study/plan';
import { chooseRequestOf, fitRequestOf, type Evidence } from '@shared/study/requests';
import { deliveredSetting } from '@shared/study/results';
import { useQueries, useQuery } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import { ContourMap } from '@/charts/ContourMap';
import { ChartFrame } from '@/charts/Chart';
import type { MapRun } from '@/charts/mapScales';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { Segments } from '@/components/Segments';
import { LoadingState } from '@/components/states';
import { calculation } from '@/engine/engine';
import { formatNumber } from '@/lib/format';
import {
  axisWords,
  dialOf,
  isOnSlice,
  limitsOf,
  mapAxes,
  middleSetting,
  numericFactors,
  type MapModel,
} from './mapModel';
import {
  COLUMNS,
  evenly,
  heldWords,
  limitName,
  rangeOf,
  residualOf,
  ROWS,
  sectionEnds,
} from './mapGrid';
import { exactGoals, modelledGoals } from './goalLines';
import { SectionPanel, type SectionWay } from './SectionPanel';
import { SetPointPanel } from './SetPointPanel';

interface MapBoardProps {
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly models: readonly MapModel[];
}

interface MapBoardProps {
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly models: readonly MapModel[];
}

/** The map is the hero: one response over two set-points, with everything that limits it. */
export function MapBoard({ evidence, models }: MapBoardProps) {
  const { brief, envelope, runs } = evidence;
  const [shown, setShown] = useState(models[0]?.response.key ?? '');
  const [setting, setSetting] = useState<SettingJson>(() => middleSetting(evidence));
  const [way, setWay] = useState<SectionWay>('slanted');
  const model = models.find(({ response }) => response.key === shown) ?? models[0];
  const axes = mapAxes(evidence);
  const [xKey, yKey] = axes;
  const [xRange, yRange] = [rangeOf(evidence, xKey), rangeOf(evidence, yKey)];
  const [xLow, xHigh] = xRange;
  const [yLow, yHigh] = yRange;
  const grid = { x: evenly(xLow, xHigh, COLUMNS), y: evenly(yLow, yHigh, ROWS) };
  const others = brief.factors.map(({ key }) => key).filter((key) => !axes.includes(key));
  const slice = useDeferredValue(setting);
  const surfaces = useQueries({
    queries: models.map(({ response, fit }) =>
      calculation('surface', {
        fit: fitRequestSchema.parse(fitRequestOf(evidence, response, fit)),
        constraints: constraintsOf(brief, envelope),
        x: { key: xKey, values: grid.x },
        y: { key: yKey, values: grid.y },
        // the axes are swept: only the others decide the slice
        at: Object.fromEntries(
          brief.factors.map(({ key }) => [
            key,
            others.includes(key) ? slice[key] : rangeOf(evidence, key)[0],
          ]),
        ),
      }),
    ),
  });
  const choices = Object.fromEntries(models.map(({ response, fit }) => [response.key, fit]));
  const request = chooseRequestOf(evidence, choices);
  const { data: chosen } = useQuery(
    calculation('choose', {
      ...request,
      fixed: { ...request.fixed, ...variedSettings(brief, slice) },
      support: 'region',
      top: 1,
    }),
  );
  const at = models.findIndex(({ response }) => response.key === model?.response.key);
  const surface = surfaces[at]?.data;
  const failure = surfaces.find(({ error }) => error)?.error;

  const goals = [
    ...modelledGoals(
      models,
      surfaces.map(({ data }) => data?.predicted ?? null),
      shown,
    ),
    ...exactGoals(evidence, axes, grid, slice),
  ];

  if (!model) return null;
  const { response, answer } = model;
  const mapRuns = runs
    .filter(
      ({ status, results }) => status === 'recorded' && (results[response.key] ?? null) !== null,
    )
    .map((run): MapRun => {
      const delivered = deliveredSetting(run.settings, run.actual);
      const diagnosis = answer.diagnostics.find(({ id }) => String(id) === String(run.number));
      return {
        id: String(run.number),
        x: delivered[xKey],
        y: delivered[yKey],
        residual: residualOf(diagnosis?.studentizedInternal),
        isOnSlice: isOnSlice(evidence, axes, run, setting),
      };
    });
  const move = (key: SetPointKey, by: number) => {
    const values = dialOf(evidence, key);
    const next =
      values[Math.max(0, Math.min(values.length - 1, values.indexOf(setting[key]) + by))];
    if (next !== undefined) setSetting((was) => ({ ...was, [key]: next }));
  };
  const pick = (u: number, v: number) => {
    const settled = (key: SetPointKey, value: number, [low, high]: readonly [number, number]) => {
      const factor = numericFactors(evidence).find((each) => each.key === key);
      const inside = Math.max(low, Math.min(high, value));
      return factor ? snap(factor, inside) : inside;
    };
    setSetting((was) => ({
      ...was,
      [xKey]: settled(xKey, u, xRange),
      [yKey]: settled(yKey, v, yRange),
    }));
  };
  const scales = Object.fromEntries(
    brief.responses.map((each) => {
      const values = runs.flatMap(({ results }) => results[each.key] ?? []);
      const limits = limitsOf(each).map(({ value }) => value);
      const all = [...values, ...limits];
      const [low, high] = [Math.min(...all), Math.max(...all)];
      const pad = 0.1 * (high - low || 1);
      return [each.key, [low - pad, high + pad] as const];
    }),
  );
  const ends = sectionEnds(way, xRange, yRange, [setting[xKey], setting[yKey]]);
  const held = others.map(heldWords(setting));
  const limitWords = constraintsOf(brief, envelope).map(limitName(envelope));
  const rows = grid.y.flatMap((v, j) =>
    j % 10 === 0
      ? grid.x.flatMap((u, i) =>
          i % 10 === 0
            ? [
                {
                  u,
                  v,
                  value: surface?.predicted[j]?.[i] ?? null,
                  isFeasible: surface?.feasible[j]?.[i] ?? false,
                },
              ]
            : [],
        )
      : [],
  );
  return (
    <div className="grid gap-4 desk:grid-cols-[minmax(0,1fr)_23rem] items-start">
      <div className="grid gap-4 min-w-0">
        <Panel
          name={response.name}
          fact={`over ${axisWords(xKey).name.toLowerCase()} and ${axisWords(yKey).name.toLowerCase()}${held.length > 0 ? ` at ${held.join(', ')}` : ''}`}
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
        >
          {failure && <Notice tone="stop">{failure.message}</Notice>}
          {!surface && !failure && <LoadingState what="Drawing the map." />}
          {surface && (
            <div
              onKeyDown={(event) => {
                if (event.key.toLowerCase() !== 's') return;
                setWay(way === 'slanted' ? 'across' : way === 'across' ? 'up' : 'slanted');
              }}
            >
              <ChartFrame
                label={`Contour map of ${response.name}`}
                isInteractive
                table={{
                  columns: [
                    {
                      key: 'x',
                      header: axisWords(xKey).name,
                      unit: axisWords(xKey).unit,
                      numeric: true,
                      cell: ({ u }) => formatNumber(u, 1),
                    },
                    {
                      key: 'y',
                      header: axisWords(yKey).name,
                      unit: axisWords(yKey).unit,
                      numeric: true,
                      cell: ({ v }) => formatNumber(v, 1),
                    },
                    {
                      key: 'z',
                      header: response.name,
                      unit: response.unit,
                      numeric: true,
                      cell: ({ value }) => formatNumber(value, 1),
                    },
                    {
                      key: 'f',
                      header: 'Can be dialled in',
                      cell: ({ isFeasible }) => (isFeasible ? 'yes' : 'no'),
                    },
                  ],
                  rows,
                  rowKey: ({ u, v }) => `${u} ${v}`,
                }}
              >
                <ContourMap
                  label={`Contour map of ${response.name}. Arrow keys move the set-point, page keys the ${others[0] ?? 'slice'}, S swings the section.`}
                  x={{ ...axisWords(xKey), values: grid.x }}
                  y={{ ...axisWords(yKey), values: grid.y }}
                  predicted={surface.predicted}
                  feasible={surface.feasible}
                  limits={surface.slack.map((values, i) => ({
                    values,
                    words: limitWords[i] ?? '',
                  }))}
                  spread={surface.spread}
                  runs={mapRuns}
                  goals={goals}
                  setPoint={{ x: setting[xKey], y: setting[yKey] }}
                  section={ends}
                  onPick={({ x, y }) => pick(x, y)}
                  onMove={({ dx, dy, dz, isFar }) => {
                    const times = isFar ? 5 : 1;
                    if (dx !== 0) move(xKey, dx * times);
                    if (dy !== 0) move(yKey, dy * times);
                    if (dz !== 0 && others[0]) move(others[0], dz * times);
                  }}
                />
              </ChartFrame>
              <p className="text-1 text-ink-3">
                Rings: runs, filled by their residual; small rings: runs on another slice. Teeth:
                the side where a goal holds. Hatched: cannot be dialled in. Dotted: few data.
              </p>
            </div>
          )}
        </Panel>
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
        chance={chosen?.best[0] ?? null}
        scales={scales}
        onChange={setSetting}
      />
    </div>
  );
}
