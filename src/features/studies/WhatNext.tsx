import type { CandidateJson } from '@shared/schemas/release';
import type { RunJson } from '@shared/schemas/run';
import type { StudyJson } from '@shared/schemas/study';
import { whatNext } from '@shared/study/whatNext';
import { LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { formatDuration, formatMass } from '@/lib/format';

interface WhatNextProps {
  readonly study: StudyJson;
  readonly runs: readonly RunJson[];
  readonly candidates: readonly CandidateJson[];
}

export function WhatNext({ study, runs, candidates }: WhatNextProps) {
  const step = whatNext({ study, runs, candidates });
  return (
    <Panel name="What next?" fact={`from ${study.progress.runsRecorded} recorded runs`}>
      <div className="grid gap-4 p-2">
        <p className="say">{step.claim}</p>
        <p className="reading">{step.words}</p>
        {step.cost && (
          <dl className="flex flex-wrap gap-6">
            <div>
              <dt className="text-2 text-ink-3">Runs</dt>
              <dd className="text-5">{step.cost.runs}</dd>
            </div>
            <div>
              <dt className="text-2 text-ink-3">Sample</dt>
              <dd className="text-5">{formatMass(step.cost.massG)}</dd>
            </div>
            <div>
              <dt className="text-2 text-ink-3">Bench time</dt>
              <dd className="text-5">{formatDuration(60 * step.cost.minutes)}</dd>
            </div>
          </dl>
        )}
        <div className="flex flex-wrap gap-2">
          <LinkButton to={`/studies/${study.id}/${step.to}`} look="primary">
            {step.action}
          </LinkButton>
          {study.progress.modelsKept > 0 && step.to !== 'map' && (
            <LinkButton to={`/studies/${study.id}/map`}>Look at the map</LinkButton>
          )}
        </div>
      </div>
    </Panel>
  );
}
