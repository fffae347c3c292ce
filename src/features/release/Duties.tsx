import type { FitJson } from '@shared/schemas/fit';
import type { ModelledRun } from '@shared/study/requests';
import type { SettingJson } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { brokenLimits } from '@shared/study/envelope';
import { Panel } from '@/components/Panel';
import { formatP } from '@/lib/format';
import { sameSetting } from './Ranking';

interface Duty {
  readonly state: '' | 'half' | 'open';
  readonly words: string;
}

interface DutiesProps {
  readonly study: StudyJson;
  readonly fits: readonly FitJson[];
  readonly runs: readonly (ModelledRun & { readonly purpose: string })[];
  readonly setting: SettingJson | null;
}

function modelDuties(fits: readonly FitJson[]): Duty[] {
  const stale = fits.filter(({ isStale }) => isStale);
  if (stale.length > 0)
    return [
      {
        state: 'open',
        words: `Runs have changed since ${stale.length} model${stale.length > 1 ? 's were' : ' was'} kept: the analyst keeps them anew.`,
      },
    ];
  const lacking = fits.filter(({ summary }) => (summary.lackOfFitP ?? 1) < 0.05);
  return lacking.length > 0
    ? [
        {
          state: 'half',
          words: `Lack of fit shows in ${lacking.length} of ${fits.length} models (p = ${lacking.map(({ summary }) => formatP(summary.lackOfFitP)).join(', ')}).`,
        },
      ]
    : [{ state: '', words: `${fits.length} models are kept; none shows lack of fit.` }];
}

function settingDuties({ study, runs, setting }: DutiesProps): Duty[] {
  if (!setting || !study.rig || !study.brief)
    return [{ state: 'open', words: 'No setting is looked at yet.' }];
  const broken = brokenLimits(study.rig.envelope, setting);
  const outside = study.brief.factors.filter(
    ({ key, low, high }) => setting[key] < low || setting[key] > high,
  );
  const confirmed = runs.filter(
    ({ purpose, status, settings }) =>
      purpose === 'confirm' && status === 'recorded' && sameSetting(settings, setting),
  ).length;
  return [
    broken.length > 0
      ? { state: 'open', words: broken[0]?.message ?? '' }
      : outside.length > 0
        ? { state: 'open', words: 'The setting lies outside the ranges of the models.' }
        : { state: '', words: 'The setting can be dialled in and lies inside the ranges.' },
    confirmed >= 3
      ? { state: '', words: `Confirmed with ${confirmed} fresh bags.` }
      : confirmed > 0
        ? {
            state: 'half',
            words: `Confirmed with ${confirmed} fresh bag${confirmed > 1 ? 's' : ''}; three are usual.`,
          }
        : {
            state: 'open',
            words:
              'Not confirmed: fresh bags at this setting are still to be run. A signature without them says so.',
          },
  ];
}

/** What is done and what is open before somebody puts a name to it. */
export function Duties(props: DutiesProps) {
  const duties = [...modelDuties(props.fits), ...settingDuties(props)];
  return (
    <Panel name="Before you sign">
      <ul className="grid gap-3 key">
        {duties.map(({ state, words }) => (
          <li key={words} className="grid grid-cols-[16px_1fr] gap-3 items-start">
            <i className={`${state} mt-1`} />
            <span>
              {words}
              <span className="sr-only">
                {state === '' ? ' (done)' : state === 'half' ? ' (partly)' : ' (open)'}
              </span>
            </span>
          </li>
        ))}
      </ul>
    </Panel>
  );
}
