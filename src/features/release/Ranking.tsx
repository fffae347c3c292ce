import type { ChooseAnswer } from '@shared/schemas/calc/choose';
import type { CandidateJson } from '@shared/schemas/release';
import type { ResponseJson } from '@shared/schemas/response';
import { SET_POINTS, type SettingJson } from '@shared/schemas/setPoint';
import type { BriefJson } from '@shared/schemas/study';
import { fullSetting } from '@shared/study/plan';
import { goalSentence } from '@shared/study/goalSentence';
import { DataTable, type Column } from '@/components/DataTable';
import { GoalMark, goalState } from '@/components/GoalMark';
import { HundredSquares } from '@/components/HundredSquares';
import { decimalsFor, formatInterval, formatNumber, formatPlain } from '@/lib/format';

type Chosen = ChooseAnswer['best'][number];

interface RankingProps {
  readonly brief: BriefJson;
  readonly best: readonly Chosen[];
  readonly candidates: readonly CandidateJson[];
  readonly picked: SettingJson | null;
  /** Why this person may not take a candidate, or null. */
  readonly why: string | null;
  readonly onPick: (setting: SettingJson) => void;
  readonly onTake: (setting: SettingJson) => void;
}

export const sameSetting = (a: SettingJson, b: SettingJson) =>
  SET_POINTS.every(({ key }) => a[key] === b[key]);

function responseColumn(response: ResponseJson): Column<Chosen & { setting: SettingJson }> {
  const { key, name, unit, aim, low, high } = response;
  return {
    key: `response ${key}`,
    header: (
      <>
        {name}
        {unit && `, ${unit}`}
        <br />
        {goalSentence({ ...response, unit: '' })}
      </>
    ),
    numeric: true,
    cell: ({ responses }) => {
      const at = responses[key];
      if (!at) return '—';
      const decimals = decimalsFor(at.predicted);
      return (
        <>
          <span className="inline-flex gap-2 items-center">
            <b>{formatNumber(at.predicted, decimals)}</b>
            {aim !== 'observe' && low !== null && high !== null && (
              <GoalMark aim={aim} state={goalState(aim, { low, high }, at)} isWordless />
            )}
          </span>
          <div className="interval">
            {at.piLow === null ? 'computed' : formatInterval(at.piLow, at.piHigh, decimals)}
          </div>
        </>
      );
    },
  };
}

/** Settable settings, ranked; each with its intervals and the chance that all goals hold. */
export function Ranking({ brief, best, candidates, picked, why, onPick, onTake }: RankingProps) {
  const rows = best.map((each) => ({ ...each, setting: fullSetting(brief, each.settings) }));
  type Row = (typeof rows)[number];
  const letterOf = (setting: SettingJson) =>
    candidates.find((candidate) => sameSetting(candidate.settings, setting))?.letter;
  const goals = brief.responses.filter(({ aim }) => aim !== 'observe');
  const columns: Column<Row>[] = [
    {
      key: 'letter',
      header: <span className="sr-only">Letter</span>,
      cell: ({ setting }) => {
        const letter = letterOf(setting);
        return letter ? <span className="letter">{letter}</span> : null;
      },
    },
    ...brief.factors.map(({ key }): Column<Row> => {
      const setPoint = SET_POINTS.find((each) => each.key === key);
      return {
        key,
        header: setPoint?.unit || setPoint?.name.toLowerCase() || key,
        numeric: true,
        cell: ({ setting }) => <span className="mono text-4">{formatPlain(setting[key])}</span>,
      };
    }),
    ...goals.map(responseColumn),
    {
      key: 'chance',
      header: 'Chance',
      numeric: true,
      cell: ({ probabilityAllGoals, probabilityError }) =>
        probabilityAllGoals === null ? (
          '—'
        ) : (
          <>
            <b className="text-5">{Math.round(100 * probabilityAllGoals)}</b>
            <div className="interval">
              of 100
              {probabilityError === null ? '' : `, ±${formatNumber(100 * probabilityError, 1)}`}
            </div>
          </>
        ),
    },
    {
      key: 'squares',
      header: '100 imagined repeats',
      cell: ({ probabilityAllGoals, probabilityError }) =>
        probabilityAllGoals === null ? null : (
          <HundredSquares probability={probabilityAllGoals} error={probabilityError} />
        ),
    },
    {
      key: 'act',
      header: <span className="sr-only">Actions</span>,
      cell: ({ setting }) => (
        <span className="grid gap-2 justify-items-end">
          <button type="button" className="btn" onClick={() => onPick(setting)}>
            Look at it
            <span className="sr-only">
              : {setting.voltage} kV, {setting.gap} mm, {setting.pulses} pulses
            </span>
          </button>
          {why === null && letterOf(setting) === undefined && (
            <button type="button" className="link" onClick={() => onTake(setting)}>
              Take as candidate
              <span className="sr-only">
                : {setting.voltage} kV, {setting.gap} mm, {setting.pulses} pulses
              </span>
            </button>
          )}
        </span>
      ),
    },
  ];
  return (
    <DataTable
      caption="Ranked settings"
      columns={columns}
      rows={rows}
      rowKey={({ setting }) => SET_POINTS.map(({ key }) => setting[key]).join(' ')}
      rowClass={({ setting }) => picked !== null && sameSetting(setting, picked) && 'pick'}
    />
  );
}
