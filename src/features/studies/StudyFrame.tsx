import type { StudyJson } from '@shared/schemas/study';
import type { Stage } from '@shared/schemas/stage';
import type { ReactNode } from 'react';
import { PracticeTag } from '@/components/PracticeTag';
import { StageLine } from '@/components/StageLine';
import { useTitle } from '@/hooks/useTitle';
import { formatPlain } from '@/lib/format';
import { STAGE_NAMES, stationsOf } from './stations';

interface StudyFrameProps {
  readonly study: StudyJson;
  readonly here: Stage;
  /** The next action: one primary button, or nothing. */
  readonly action?: ReactNode;
  readonly children: ReactNode;
}

function factsOf(study: StudyJson): string {
  const { brief, rig, sample } = study;
  return [
    study.code,
    sample.name,
    brief ? `bags of ${formatPlain(brief.batchMassG)} g` : null,
    rig ? `${rig.name}, envelope rev. ${rig.revision}` : null,
  ]
    .filter(Boolean)
    .join(' · ');
}

/** Header with title, facts and stage line, and below it the stage’s own page. */
export function StudyFrame({ study, here, action, children }: StudyFrameProps) {
  useTitle(`${STAGE_NAMES[here]} · ${study.code}`);
  return (
    <main>
      <div className="head">
        <div className="min-w-0">
          <h1>{study.title}</h1>
          <div className="sub">
            {factsOf(study)} {study.isSimulated && <PracticeTag isShort />}
          </div>
        </div>
        <div className="stage-slot min-w-0">
          <StageLine stations={stationsOf(study)} here={here} />
        </div>
        <div className="no-print">{action}</div>
      </div>
      <div className="page">{children}</div>
    </main>
  );
}
