import { fitRequestSchema } from '@shared/schemas/calc/fit';
import type { RunJson } from '@shared/schemas/run';
import { setPointOf, type SettingJson, type SetPointKey } from '@shared/schemas/setPoint';
import { snap } from '@shared/stats/coding/snap';
import { constraintsOf, variedSettings } from '@shared/study/plan';
import { chooseRequestOf, fitRequestOf, type Evidence } from '@shared/study/requests';
import { deliveredSetting } from '@shared/study/results';
import { useQueries, useQuery } from '@tanstack/react-query';
import { useDeferredValue, useMemo, useState } from 'react';
import { ChartFrame } from '@/charts/Chart';
import { ContourMap } from '@/charts/map/ContourMap';
import type { MapGoal, MapInput, MapRun } from '@/charts/map/mapInput';
import { MapLegend } from '@/charts/map/MapLegend';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { Segments } from '@/components/Segments';
import { LoadingState } from '@/components/states';
import { calculation } from '@/engine/engine';
import { formatNumber, formatPlain, withUnit } from '@/lib/format';
import {
  axisWords,
  computedAt,
  dialOf,
  isOnSlice,
  limitsOf,
  mapAxes,
  middleSetting,
  numericFactors,
  predictionAt,
  type MapModel,
} from './mapModel';
import { rigLimitsOn } from './rigLimits';
import { SectionPanel, type SectionEnds, type SectionWay } from './SectionPanel';
import { SetPointPanel } from './SetPointPanel';

const COLUMNS = 61;
const ROWS = 51;

const NEXT_WAY: Readonly<Record<SectionWay, SectionWay>> = {
  slanted: 'across',
  across: 'up',
  up: 'slanted',
};

const mapAxis = (key: SetPointKey) => {
  const { name, unit } = axisWords(key);
  return { label: name, unit };
};

interface MapBoardProps {
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly models: readonly MapModel[];
}

const evenly = (low: number, high: number, n: number) =>
  Array.from({ length: n }, (_, i) => low + ((high - low) * i) / (n - 1));

function rangeOf({ brief }: Evidence, key: SetPointKey): readonly [number, number] {
  const factor = brief.factors.find((each) => each.key === key);
  return [factor?.low ?? 0, factor?.high ?? 1];
}

function sectionEnds(
  way: SectionWay,
  x: readonly [number, number],
  y: readonly [number, number],
  at: readonly [number, number],
): SectionEnds {
  if (way === 'across')
    return [
      [x[0], at[1]],
      [x[1], at[1]],
    ];
  if (way === 'up')
    return [
      [at[0], y[0]],
      [at[0], y[1]],
    ];
  const inset = (range: readonly [number, number], share: number) =>
    range[0] + share * (range[1] - range[0]);
  return [
    [inset(x, 0.08), inset(y, 0.08)],
    [inset(x, 0.92), inset(y, 0.96)],
  ];
}

/** The map is the hero: one response over two set-points, with everything that limits it. */
export function MapBoard({ evidence, models }: MapBoardProps) {
  const { brief, envelope, runs } = evidence;
  const [shown, setShown] = useState(models[0]?.response.key ?? '');
  const [setting, setSetting] = useState<SettingJson>(() => middleSetting(evidence));
  const [way, setWay] = useState<SectionWay>('slanted');
  const [isTable, setIsTable] = useState(false);
  const model = models.find(({ response }) => response.key === shown) ?? models[0];
  const axes = mapAxes(evidence);
  const [xKey, yKey] = axes;
  const [xRange, yRange] = [rangeOf(evidence, xKey), rangeOf(evidence, yKey)];
  const grid = useMemo(
    () => ({
      x: evenly(xRange[0], xRange[1], COLUMNS),
      y: evenly(yRange[0], yRange[1], ROWS),
    }),
    [xRange[0], xRange[1], yRange[0], yRange[1]],
  );
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

  const goals = useMemo((): MapGoal[] => {
    const modelled = models.flatMap(({ response }, i) => {
      const values = surfaces[i]?.data?.predicted;
      return values
        ? limitsOf(response).map(({ value, holdsAbove }) => ({
            label: `${response.key === shown ? '' : `${response.name} `}${withUnit(formatPlain(value), response.unit)}`,
            values,
            level: value,
            side: holdsAbove ? ('atLeast' as const) : ('atMost' as const),
          }))
        : [];
    });
    const exact = brief.responses.flatMap((response) => {
      if (computedAt(evidence, response, slice) === null) return [];
      const values = grid.y.map((v) =>
        grid.x.map((u) => computedAt(evidence, response, { ...slice, [xKey]: u, [yKey]: v }) ?? 0),
      );
      return limitsOf(response).map(({ value, holdsAbove }) => ({
        label: withUnit(formatPlain(value), response.unit),
        values,
        level: value,
        side: holdsAbove ? ('atLeast' as const) : ('atMost' as const),
      }));
    });
    return [...modelled, ...exact];
  }, [models, surfaces, brief.responses, evidence, slice, grid, xKey, yKey, shown]);

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
        id: run.number,
        x: delivered[xKey],
        y: delivered[yKey],
        residualShare: diagnosis?.studentizedInternal ?? 0,
        onSlice: isOnSlice(evidence, axes, run, setting),
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
  const held = others.map(
    (key) => `${setPointOf(key).name} ${withUnit(formatPlain(setting[key]), setPointOf(key).unit)}`,
  );
  const map: MapInput | null = surface
    ? {
        x: { ...mapAxis(xKey), values: grid.x },
        y: { ...mapAxis(yKey), values: grid.y },
        z: surface.predicted,
        unit: response.unit,
        limits: rigLimitsOn(evidence, axes, grid, slice),
        support: surface.spread,
        runs: mapRuns,
        goals,
        setPoint: { x: setting[xKey], y: setting[yKey] },
        section: {
          from: { x: ends[0][0], y: ends[0][1] },
          to: { x: ends[1][0], y: ends[1][1] },
        },
      }
    : null;
  const here = predictionAt(model, evidence, setting);
  const reading = `${axes
    .map((key) => withUnit(formatPlain(setting[key]), setPointOf(key).unit))
    .join(', ')}: ${withUnit(formatNumber(here.predicted, 1), response.unit)}`;
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
          {map && (
            <>
              <ChartFrame
                label={`Contour map of ${response.name}`}
                isInteractive
                view={{ isTable, onSwitched: setIsTable }}
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
                  map={map}
                  label={`Contour map of ${response.name}`}
                  height={440}
                  reading={reading}
                  onPlaced={({ x, y }) => pick(x, y)}
                  onMoved={({ dx, dy, dz }) => {
                    if (dx !== 0) move(xKey, dx);
                    if (dy !== 0) move(yKey, dy);
                    if (dz !== 0 && others[0]) move(others[0], dz);
                  }}
                  onSwung={() => setWay(NEXT_WAY[way])}
                  onTableAsked={() => setIsTable(true)}
                />
              </ChartFrame>
              {!isTable && <MapLegend map={map} />}
            </>
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
