import { setPointOf, type SettingJson, type SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence, ModelledRun } from '@shared/study/requests';
import { deliveredSetting } from '@shared/study/results';
import { Chart } from '@/charts/Chart';
import { sectionOption, type SectionPoint } from '@/charts/sectionOption';
import { Panel } from '@/components/Panel';
import { Segments } from '@/components/Segments';
import { formatInterval, formatNumber, withUnit } from '@/lib/format';
import { limitsOf, predictionAt, type MapModel } from './mapModel';
import { residualShareOf } from './mapRuns';

export type SectionWay = 'across' | 'up' | 'slanted';
export type SectionEnds = readonly [readonly [number, number], readonly [number, number]];

const POINTS = 61;
const NEAR = 0.16;

interface SectionPanelProps {
  readonly evidence: Evidence;
  readonly model: MapModel;
  readonly axes: readonly [SetPointKey, SetPointKey];
  readonly ends: SectionEnds;
  readonly setting: SettingJson;
  readonly runs: readonly ModelledRun[];
  readonly way: SectionWay;
  readonly onWay: (way: SectionWay) => void;
}

type Span = readonly [number, number];

/** Where a point lies along the line in units of the ranges, and how far off it. */
function projected(at: Span, ends: SectionEnds, spans: Span): { share: number; off: number } {
  const [a, b] = ends;
  const scaled = ([x, y]: Span): Span => [x / spans[0], y / spans[1]];
  const [ax, ay] = scaled(a);
  const [bx, by] = scaled(b);
  const [px, py] = scaled(at);
  const length = (bx - ax) ** 2 + (by - ay) ** 2 || 1;
  const share = ((px - ax) * (bx - ax) + (py - ay) * (by - ay)) / length;
  const off = Math.hypot(px - ax - share * (bx - ax), py - ay - share * (by - ay));
  return { share, off };
}

/** As on a geological map: the response along a line, with its bands and the measured runs near it. */
export function SectionPanel(props: SectionPanelProps) {
  const { evidence, model, axes, ends, setting, runs, way, onWay } = props;
  const [xKey, yKey] = axes;
  const { response } = model;
  const span = (key: SetPointKey) => {
    const factor = evidence.brief.factors.find((each) => each.key === key);
    return factor ? factor.high - factor.low : 1;
  };
  const spans: Span = [span(xKey), span(yKey)];
  const [a, b] = ends;
  const words = (x: number, y: number) =>
    `${withUnit(formatNumber(y, 0), setPointOf(yKey).unit)}, ${withUnit(formatNumber(x, 0), setPointOf(xKey).unit)}`;
  const points = Array.from({ length: POINTS }, (_, i): SectionPoint & { words: string } => {
    const share = i / (POINTS - 1);
    const x = a[0] + share * (b[0] - a[0]);
    const y = a[1] + share * (b[1] - a[1]);
    const at = predictionAt(model, evidence, { ...setting, [xKey]: x, [yKey]: y });
    const bound = (value: number | null) => value ?? at.predicted;
    return {
      share,
      x,
      y,
      words: words(x, y),
      mean: at.predicted,
      ciLow: bound(at.ciLow),
      ciHigh: bound(at.ciHigh),
      piLow: bound(at.piLow),
      piHigh: bound(at.piHigh),
    };
  });
  const near = runs.flatMap((run) => {
    const value = run.results[response.key] ?? null;
    if (run.status !== 'recorded' || value === null) return [];
    const delivered = deliveredSetting(run.settings, run.actual);
    const { share, off } = projected([delivered[xKey], delivered[yKey]], ends, spans);
    if (share < 0 || share > 1 || off > NEAR) return [];
    // moved onto the section: what the run was above the model stays above it
    const foot = {
      ...setting,
      [xKey]: a[0] + share * (b[0] - a[0]),
      [yKey]: a[1] + share * (b[1] - a[1]),
    };
    const residual = value - predictionAt(model, evidence, delivered).predicted;
    return [
      {
        id: run.number,
        share,
        value: predictionAt(model, evidence, foot).predicted + residual,
        residualShare: residualShareOf(model, run),
      },
    ];
  });
  const here = projected([setting[xKey], setting[yKey]], ends, spans);
  return (
    <Panel
      name="Section A–A′"
      fact={response.name}
      control={
        <Segments
          label="Direction of the section"
          value={way}
          options={[
            { value: 'slanted', label: 'slanted' },
            { value: 'across', label: 'across' },
            { value: 'up', label: 'up' },
          ]}
          onChange={onWay}
        />
      }
    >
      <Chart
        label={`${response.name} along the section line with its bands`}
        height={210}
        option={(tokens, size) =>
          sectionOption(
            {
              name: `${response.name}${response.unit && `, ${response.unit}`}`,
              x: { unit: setPointOf(xKey).unit, digits: 1 },
              y: { unit: setPointOf(yKey).unit, digits: 0 },
              points,
              runs: near,
              limits: limitsOf(response).map(({ value, holdsAbove }) => ({
                value,
                side: holdsAbove ? 'atLeast' : 'atMost',
              })),
              setPointShare: here.share >= 0 && here.share <= 1 ? here.share : null,
            },
            tokens,
            size,
          )
        }
        table={{
          columns: [
            { key: 'at', header: 'At', cell: ({ words: place }) => place },
            {
              key: 'mean',
              header: 'Predicted',
              unit: response.unit,
              numeric: true,
              cell: ({ mean }) => formatNumber(mean, 1),
            },
            {
              key: 'ci',
              header: 'Mean, 95 %',
              numeric: true,
              cell: ({ ciLow, ciHigh }) => formatInterval(ciLow, ciHigh),
            },
            {
              key: 'pi',
              header: 'One new bag, 95 %',
              numeric: true,
              cell: ({ piLow, piHigh }) => formatInterval(piLow, piHigh),
            },
          ],
          rows: points.filter((_, i) => i % 5 === 0),
          rowKey: ({ share }) => share,
        }}
      />
    </Panel>
  );
}
