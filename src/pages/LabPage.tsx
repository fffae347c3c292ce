import { labPolicy, personPolicy, rigPolicy } from '@shared/policies/lab';
import { useQuery } from '@tanstack/react-query';
import { Checkbox } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { People } from '@/features/lab/People';
import { RigPanel } from '@/features/lab/RigPanel';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { labQueries, useChangeLab } from '@/queries/lab';

function Rules() {
  const { data: lab } = useQuery(labQueries.lab());
  const change = useChangeLab();
  const why = labPolicy.change(useActor());
  if (!lab) return null;
  return (
    <Panel name="Rules of the lab">
      <Checkbox
        label="Two persons: whoever kept a model does not sign the settings that it recommends."
        checked={lab.twoPersonRule}
        disabled={why !== null || change.isPending}
        onChange={(event) => {
          change.mutate({ twoPersonRule: event.target.checked, version: lab.version });
        }}
      />
      {why !== null && <p className="text-2 text-ink-3">{why}</p>}
      {change.error && <Notice tone="stop">{change.error.message}</Notice>}
    </Panel>
  );
}

function Crew() {
  const { data: people, error } = useQuery(labQueries.people());
  const { data: customers } = useQuery(labQueries.customers());
  if (error) return <ErrorState error={error} />;
  if (!people || !customers) return <LoadingState what="Reading the people." />;
  return <People people={people} customers={customers} />;
}

export function LabPage() {
  useTitle('Lab');
  const actor = useActor();
  const whyNotPeople = personPolicy.read(actor);
  const whyNotRigs = rigPolicy.read(actor, undefined);
  const { data: rigs, error } = useQuery({ ...labQueries.rigs(), enabled: whyNotRigs === null });
  const { data: stacks } = useQuery({ ...labQueries.sieveStacks(), enabled: whyNotRigs === null });
  return (
    <main className="page desk:grid-cols-2">
      <h1 className="text-6 col-span-full">Lab</h1>
      <div className="grid gap-4">
        {error && <ErrorState error={error} />}
        {rigs?.map((rig) => (
          <RigPanel key={rig.id} rig={rig} />
        ))}
        {stacks && (
          <Panel name="Sieve stacks">
            <ul className="grid gap-3">
              {stacks.map(({ id, name, frameDiameterMm, aperturesMm }) => (
                <li key={id}>
                  <span className="font-mark">{name}</span>{' '}
                  <span className="text-ink-3">frame {frameDiameterMm} mm</span>
                  <div className="mono text-2">{aperturesMm.join(' · ')} mm</div>
                </li>
              ))}
            </ul>
          </Panel>
        )}
        <Rules />
      </div>
      <div className="grid gap-4">
        {whyNotPeople === null ? <Crew /> : <ForbiddenState why={whyNotPeople} />}
      </div>
    </main>
  );
}
