import type { CustomerSampleJson } from '@shared/schemas/sample';
import { STAGES, type Stage } from '@shared/schemas/stage';
import { Panel } from '@/components/Panel';
import { StageLine, type Station } from '@/components/StageLine';
import { formatDay, formatMass } from '@/lib/format';

type CustomerStudy = CustomerSampleJson['studies'][number];

/** The stages in words for someone who waits for a result. */
const NAMES: Readonly<Record<Stage, string>> = {
  brief: 'Question',
  matrix: 'Plan',
  bench: 'Runs',
  fit: 'Models',
  map: 'Review',
  release: 'Settings',
};

function stationsOf({ stage, isSigned }: CustomerStudy): Station[] {
  const now = STAGES.indexOf(stage);
  return STAGES.map((key, i) => ({
    key,
    name: NAMES[key],
    state: isSigned || i < now ? 'done' : i === now ? 'now' : 'next',
  }));
}

/** A sample of the customer’s own, with how far the work on it is. */
export function CustomerSample({ sample }: { readonly sample: CustomerSampleJson }) {
  const { name, code, material, receivedMassG, receivedOn, studies } = sample;
  return (
    <Panel
      name={name}
      fact={`${code} · ${material} · ${formatMass(receivedMassG)} received ${formatDay(receivedOn)}`}
    >
      {studies.length === 0 ? (
        <p className="text-ink-3">Received; no work has started on it yet.</p>
      ) : (
        <ul className="grid gap-6 list-none p-0 m-0">
          {studies.map((study) => (
            <li key={study.code} className="grid gap-3">
              <div>
                <span className="font-mark">{study.title}</span>{' '}
                <span className="text-2 text-ink-2">{study.words}</span>
              </div>
              <StageLine stations={stationsOf(study)} />
            </li>
          ))}
        </ul>
      )}
    </Panel>
  );
}
