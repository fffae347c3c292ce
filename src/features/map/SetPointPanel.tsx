import type { ResponseJson } from '@shared/schemas/response';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import { setPointOf } from '@shared/schemas/setPoint';
import { brokenLimits } from '@shared/study/envelope';
import { goalSentence } from '@shared/study/goalSentence';
import type { Evidence } from '@shared/study/requests';
import type { ChooseAnswer } from '@shared/schemas/calc/choose';
import { GoalMark, goalState } from '@/components/GoalMark';
import { HundredSquares } from '@/components/HundredSquares';
import { IntervalBar } from '@/components/IntervalBar';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { Stepper } from '@/components/Stepper';
import { decimalsFor, formatInterval, formatNumber } from '@/lib/format';
import { computedAt, dialOf, limitsOf, predictionAt, type MapModel } from './mapModel';

interface SetPointPanelProps {
  readonly evidence: Evidence;
  readonly models: readonly MapModel[];
  readonly setting: SettingJson;
  readonly chance: ChooseAnswer['best'][number] | null;
  readonly scales: Readonly<Record<string, readonly [number, number]>>;
  readonly onChange: (setting: SettingJson) => void;
}

interface Line {
  readonly response: ResponseJson;
  readonly predicted: number;
  readonly ci: readonly [number | null, number | null];
  readonly pi: readonly [number | null, number | null];
  readonly isExact: boolean;
}

function linesAt({ evidence, models, setting }: SetPointPanelProps): Line[] {
  return evidence.brief.responses.flatMap((response): Line[] => {
    const model = models.find((each) => each.response.key === response.key);
    if (model) {
      const { predicted, ciLow, ciHigh, piLow, piHigh } = predictionAt(model, evidence, setting);
      return [{ response, predicted, ci: [ciLow, ciHigh], pi: [piLow, piHigh], isExact: false }];
    }
    const value = computedAt(evidence, response, setting);
    return value === null
      ? []
      : [{ response, predicted: value, ci: [null, null], pi: [null, null], isExact: true }];
  });
}

function ResponseLine({
  line,
  scale,
}: {
  readonly line: Line;
  readonly scale: readonly [number, number];
}) {
  const { response, predicted, ci, pi, isExact } = line;
  const { aim, low, high, unit, name } = response;
  const decimals = decimalsFor(predicted);
  const hasGoal = aim !== 'observe' && low !== null && high !== null;
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 gap-y-1 py-3 border-b border-line items-center">
      <div>
        <div>{name}</div>
        <div className="text-2 text-ink-3">{goalSentence(response)}</div>
      </div>
      <div className="text-right">
        <div className="figure">
          {formatNumber(predicted, decimals)} <span className="unit text-3">{unit}</span>
        </div>
        <div className="interval">
          {isExact ? 'computed' : formatInterval(pi[0], pi[1], decimals)}
        </div>
      </div>
      <IntervalBar
        scale={scale}
        predicted={predicted}
        ci={ci}
        pi={pi}
        limits={limitsOf(response)}
        width={210}
      />
      {hasGoal && (
        <GoalMark
          aim={aim}
          state={goalState(aim, { low, high }, { predicted, piLow: pi[0], piHigh: pi[1] })}
        />
      )}
    </li>
  );
}

/** The values of one dial that keep every limit of the rig with the other set-points as they are. */
function allowedOf(
  evidence: Evidence,
  setting: SettingJson,
  key: SetPointKey,
): ReadonlySet<number> {
  return new Set(
    dialOf(evidence, key).filter(
      (value) => brokenLimits(evidence.envelope, { ...setting, [key]: value }).length === 0,
    ),
  );
}

/** The set-point in numbers: dials, predictions with intervals, and the chance that all goals hold. */
export function SetPointPanel(props: SetPointPanelProps) {
  const { evidence, setting, chance, scales, onChange } = props;
  const broken = brokenLimits(evidence.envelope, setting);
  return (
    <Panel name="At this set-point" fact="one new bag, 95 %">
      <div className="grid gap-4">
        {evidence.brief.factors.map(({ key }) => {
          const { name, unit } = setPointOf(key);
          return (
            <Stepper
              key={key}
              label={name}
              unit={unit}
              value={setting[key]}
              values={dialOf(evidence, key)}
              allowed={allowedOf(evidence, setting, key)}
              onChange={(value) => onChange({ ...setting, [key]: value })}
            />
          );
        })}
        {broken.map(({ key, message }) => (
          <Notice key={key} tone="caution" claim="Cannot be dialled in.">
            {message}
          </Notice>
        ))}
        <ul aria-live="polite">
          {linesAt(props).map((line) => (
            <ResponseLine
              key={line.response.key}
              line={line}
              scale={scales[line.response.key] ?? [0, 1]}
            />
          ))}
        </ul>
        {chance && chance.probabilityAllGoals !== null && (
          <div className="grid gap-2">
            <p>
              All goals hold in <b>{Math.round(100 * chance.probabilityAllGoals)} of 100</b>{' '}
              imagined repeats
              {chance.probabilityError !== null &&
                `, ±${formatNumber(100 * chance.probabilityError, 1)}`}
              .
            </p>
            <HundredSquares
              probability={chance.probabilityAllGoals}
              error={chance.probabilityError}
            />
          </div>
        )}
      </div>
    </Panel>
  );
}
