import type { ChooseAnswer } from '@shared/schemas/calc/choose';
import type { CandidateJson } from '@shared/schemas/release';
import type { ResponseJson } from '@shared/schemas/response';
import type { BriefJson } from '@shared/schemas/study';
import { variedSettings } from '@shared/study/plan';
import { Chart } from '@/charts/Chart';
import { tradeOffOption } from '@/charts/tradeOff';
import { Panel } from '@/components/Panel';
import { formatNumber, formatPlain } from '@/lib/format';

interface TradeOffProps {
  readonly brief: BriefJson;
  readonly tradeOff: ChooseAnswer['tradeOff'];
  readonly candidates: readonly CandidateJson[];
}

const limitOf = ({ aim, low, high }: ResponseJson) =>
  aim === 'minimise' ? high : aim === 'maximise' ? low : null;

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
    return at ? [{ letter, x: at.x, y: at.y }] : [];
  });
  return (
    <Panel
      name={`What ${x.name.toLowerCase()} buys`}
      fact={`${tradeOff.count} settings that no other beats`}
    >
      <Chart
        label={`Trade-off of ${y.name} against ${x.name}`}
        height={300}
        option={(tokens) =>
          tradeOffOption(
            {
              x: { name: name(x), limit: limitOf(x) },
              y: { name: name(y), limit: limitOf(y) },
              points,
              candidates: placed,
            },
            tokens,
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
        Lines: the limits.
      </p>
    </Panel>
  );
}
