import type { ChooseAnswer } from '@shared/schemas/calc/choose';
import type { CandidateJson } from '@shared/schemas/release';
import type { ResponseJson } from '@shared/schemas/response';
import type { BriefJson } from '@shared/schemas/study';
import { variedSettings } from '@shared/study/plan';
import { Chart } from '@/charts/Chart';
import type { ChartLimit } from '@/charts/limitLine';
import { tradeOffOption } from '@/charts/tradeOffOption';
import { Panel } from '@/components/Panel';
import { formatNumber, formatPlain } from '@/lib/format';

interface TradeOffProps {
  readonly brief: BriefJson;
  readonly tradeOff: ChooseAnswer['tradeOff'];
  readonly candidates: readonly CandidateJson[];
}

/** Where a goal begins to hold, and on which side. */
function limitsOf({ aim, low, high }: ResponseJson): ChartLimit[] {
  const floor =
    aim === 'minimise' || low === null ? [] : [{ value: low, side: 'atLeast' as const }];
  const ceiling =
    aim === 'maximise' || high === null ? [] : [{ value: high, side: 'atMost' as const }];
  return [...floor, ...ceiling];
}

/** Nothing better on both at once, when less of x is wanted; ascending in x. */
function frontOf(points: readonly { x: number; y: number }[], y: ResponseJson) {
  const sign = y.aim === 'minimise' ? -1 : 1;
  const front: { x: number; y: number }[] = [];
  for (const point of [...points].sort((a, b) => a.x - b.x || sign * (b.y - a.y)))
    if (sign * point.y > sign * (front.at(-1)?.y ?? -sign * Infinity)) front.push(point);
  return front;
}

const holdsAt = ({ aim, low, high }: ResponseJson, value: number | undefined) => {
  if (value === undefined || aim === 'observe') return true;
  const floor = aim === 'minimise' || low === null || value >= low;
  return floor && (aim === 'maximise' || high === null || value <= high);
};

/** What the first goal costs in the last: settings that no other beats. */
export function TradeOff({ brief, tradeOff, candidates }: TradeOffProps) {
  const goals = brief.responses.filter(({ aim }) => aim !== 'observe');
  const [y] = goals;
  const x = goals.at(-1);
  if (!y || !x || x === y || tradeOff.settings.length === 0) return null;
  const others = goals.filter((each) => each !== x && each !== y);
  const points = tradeOff.settings.flatMap(({ settings, responses }) => {
    const [px, py] = [responses[x.key], responses[y.key]];
    if (px === undefined || py === undefined) return [];
    return [
      {
        settings,
        x: px,
        y: py,
        holds: others.every((each) => holdsAt(each, responses[each.key])),
      },
    ];
  });
  const name = ({ name: words, unit }: ResponseJson) => `${words}${unit && `, ${unit}`}`;
  const placed = candidates.flatMap(({ letter, settings }) => {
    const varied = variedSettings(brief, settings);
    const at = points.find((point) =>
      Object.entries(varied).every(([key, value]) => point.settings[key] === value),
    );
    return at ? [{ letter, x: at.x, y: at.y, isReferred: false }] : [];
  });
  return (
    <Panel
      name={`What ${x.name.toLowerCase()} buys`}
      fact={`${tradeOff.count} settings that no other beats`}
    >
      <Chart
        label={`Trade-off of ${y.name} against ${x.name}`}
        height={300}
        option={(tokens, size) =>
          tradeOffOption(
            {
              x: { name: name(x), limits: limitsOf(x) },
              y: { name: name(y), limits: limitsOf(y) },
              points,
              front: x.aim === 'minimise' ? frontOf(points, y) : [],
              candidates: placed,
            },
            tokens,
            size,
          )
        }
        table={{
          columns: [
            ...brief.factors.map(({ key }) => ({
              key,
              header: key,
              numeric: true,
              cell: ({ settings }: (typeof points)[number]) => formatPlain(Number(settings[key])),
            })),
            {
              key: 'y',
              header: name(y),
              numeric: true,
              cell: ({ y: value }) => formatNumber(value, 1),
            },
            {
              key: 'x',
              header: name(x),
              numeric: true,
              cell: ({ x: value }) => formatNumber(value, 1),
            },
            {
              key: 'h',
              header: 'Other goals',
              cell: ({ holds }) => (holds ? 'hold' : 'do not hold'),
            },
          ],
          rows: points.slice(0, 100),
          rowKey: ({ settings }) => JSON.stringify(settings),
        }}
      />
      <p className="text-1 text-ink-3">
        {others.length > 0
          ? `Filled where ${others.map(({ name: each }) => each.toLowerCase()).join(' and ')} ${others.length > 1 ? 'hold' : 'holds'} too. `
          : ''}
        Toothed: the limits. Stairs: nothing better for that much.
      </p>
    </Panel>
  );
}
