import { PRE_RUN_CHECKS, runJsonSchema, type RunJson } from '@shared/schemas/run';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { BriefJson, StudyJson } from '@shared/schemas/study';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { ApiError } from '@/lib/api';
import { classes } from '@/lib/classes';
import { useRecordRun } from '@/queries/runs';
import { Balances } from './Balances';
import { Cautions } from './Cautions';
import { Checks } from './Checks';
import { dropDraft, keepDraft, readDraft } from './draft';
import { liveSieve } from './liveSieve';
import { RecordFields } from './RecordFields';
import { fieldOfPath, formOfRun, readRun, type RunForm, type RunProblems } from './runForm';
import { SetPointTiles } from './SetPointTiles';
import { SieveGrid } from './SieveGrid';
import { SieveReading } from './SieveReading';
import { VoidDialog } from './VoidDialog';

const STEPS = ['Check', 'Record', 'Sieve'] as const;
type Step = (typeof STEPS)[number];

interface RunSheetProps {
  readonly study: StudyJson;
  readonly brief: BriefJson;
  readonly envelope: EnvelopeJson;
  readonly run: RunJson;
  readonly before: RunJson | null;
  /** The number of the run that comes first, when it is another one. */
  readonly firstNumber: number | null;
  readonly onRecorded: (warnings: readonly string[]) => void;
}

function whyAsked(run: RunJson, firstNumber: number | null): string | null {
  if (run.status === 'recorded')
    return 'This run is recorded: say why it is changed. The old values stay readable in the trail.';
  return firstNumber !== null && firstNumber !== run.number
    ? `Run ${firstNumber} comes first: the order was drawn at random on purpose. Say why this one is done now.`
    : null;
}

interface CheckStepProps extends RunSheetProps {
  readonly form: RunForm;
  readonly onChange: (changes: Partial<RunForm>) => void;
  readonly onNext: () => void;
  readonly onVoid: () => void;
}

/** What to dial in, what to check first, and the cautions. */
function CheckStep({
  brief,
  envelope,
  run,
  before,
  form,
  onChange,
  onNext,
  onVoid,
}: CheckStepProps) {
  const open = PRE_RUN_CHECKS.length - form.checks.length;
  return (
    <div className="grid gap-4 desk:grid-cols-[minmax(0,1fr)_24rem]">
      <SetPointTiles
        settings={run.settings}
        before={before?.settings ?? null}
        envelope={envelope}
        massG={brief.batchMassG}
      />
      <div className="grid gap-4 content-start">
        <Checks done={form.checks} onChange={(checks) => onChange({ checks })} />
        <Button look="primary" size="bench" disabled={open > 0} onClick={onNext}>
          {open > 0 ? `${open} check${open > 1 ? 's' : ''} to go` : 'Checked: on to the record'}
        </Button>
        <Button look="quiet" onClick={onVoid}>
          Cannot run this one …
        </Button>
      </div>
      <div className="col-span-full">
        <Cautions />
      </div>
    </div>
  );
}

interface SieveStepProps {
  readonly brief: BriefJson;
  readonly form: RunForm;
  readonly problems: RunProblems;
  readonly closeWords: string;
  readonly isBusy: boolean;
  readonly onChange: (changes: Partial<RunForm>) => void;
  readonly onClose: () => void;
}

/** Masses, both balances and the curve, all as they are typed. */
function SieveStep(props: SieveStepProps) {
  const { brief, form, problems, closeWords, isBusy, onChange, onClose } = props;
  const sieve = liveSieve(form, brief);
  return (
    <div className="grid gap-6 desk:grid-cols-2 items-start">
      <div className="grid gap-4">
        <SieveGrid
          aperturesMm={brief.sieveStack.aperturesMm}
          values={form.sieves}
          problems={problems}
          percents={Object.fromEntries(
            (sieve?.table ?? []).map(({ apertureMm, retainedPercent }) => [
              String(apertureMm),
              retainedPercent,
            ]),
          )}
          onChange={(sieves) => onChange({ sieves })}
        />
        {problems['sieves'] !== undefined && <Notice tone="stop">{problems['sieves']}</Notice>}
        <Balances
          treatment={sieve?.balance.treatment ?? null}
          sieving={sieve?.balance.sieving ?? null}
          shape={sieve?.shape ?? []}
        />
      </div>
      <div className="grid gap-4">
        {sieve ? (
          <SieveReading sieve={sieve} brief={brief} />
        ) : (
          <p className="state">The passing curve appears with the dry feed and the first mass.</p>
        )}
        <Button look="primary" size="bench" isBusy={isBusy} onClick={onClose}>
          {closeWords}
        </Button>
      </div>
    </div>
  );
}

/** One run from dialling in to the last sieve; what is typed stays on this tablet until it is sent. */
export function RunSheet(props: RunSheetProps) {
  const { study, brief, run, firstNumber, onRecorded } = props;
  const empty = formOfRun(run, brief);
  const [form, setForm] = useState<RunForm>(() => readDraft(run.id, empty) ?? empty);
  const [isKept, setIsKept] = useState(true);
  const [step, setStep] = useState<Step>(run.status === 'recorded' ? 'Record' : 'Check');
  const [problems, setProblems] = useState<RunProblems>({});
  const [theirs, setTheirs] = useState<RunJson | null>(null);
  const [version, setVersion] = useState(run.version);
  const [isVoiding, setIsVoiding] = useState(false);
  const recordRun = useRecordRun(study.id);

  const change = (changes: Partial<RunForm>) => {
    const next = { ...form, ...changes };
    setForm(next);
    setIsKept(keepDraft(run.id, next));
  };

  const onRecord = async () => {
    const { record, problems: found } = readRun(form, version);
    setProblems(found);
    if (!record) {
      const isOnSieves = Object.keys(found).every((field) => field.startsWith('sieves'));
      setStep(isOnSieves ? 'Sieve' : 'Record');
      return;
    }
    try {
      const { warnings } = await recordRun.mutateAsync({ runId: run.id, record });
      dropDraft(run.id);
      onRecorded(warnings);
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      const current = runJsonSchema.safeParse(error.current);
      if (error.code === 'stale' && current.success) {
        setTheirs(current.data);
        return;
      }
      const at = error.issues.map(({ path, message }) => [fieldOfPath(path, record), message]);
      setProblems({ ...(Object.fromEntries(at) as RunProblems), root: error.message });
    }
  };

  return (
    <div className="grid gap-4 p-4 phone:p-6">
      <ol className="steps" aria-label="Steps of this run">
        {STEPS.map((each) => (
          <li
            key={each}
            className={classes(each === step && 'now')}
            aria-current={each === step ? 'step' : undefined}
          >
            <button type="button" onClick={() => setStep(each)}>
              {each}
            </button>
          </li>
        ))}
      </ol>
      {theirs && (
        <Notice tone="caution" claim="Somebody recorded this run meanwhile.">
          Theirs: feed {theirs.feedMassG ?? '—'} g, {theirs.sieves.length} sieves, by{' '}
          {theirs.operator?.name ?? 'somebody'}. Yours is still here; a reason is needed to change
          theirs.{' '}
          <button
            type="button"
            className="link"
            onClick={() => {
              setVersion(theirs.version);
              setTheirs(null);
              setStep('Record');
            }}
          >
            Go on with mine
          </button>
        </Notice>
      )}
      {problems['root'] !== undefined && <Notice tone="stop">{problems['root']}</Notice>}
      {step === 'Check' && (
        <CheckStep
          {...props}
          form={form}
          onChange={change}
          onNext={() => setStep('Record')}
          onVoid={() => setIsVoiding(true)}
        />
      )}
      {step === 'Record' && (
        <>
          <RecordFields
            form={form}
            problems={problems}
            brief={brief}
            asksWhy={
              version === run.version
                ? whyAsked(run, firstNumber)
                : 'It was recorded meanwhile: say why it is changed.'
            }
            onChange={change}
          />
          <Button look="primary" size="bench" onClick={() => setStep('Sieve')}>
            On to the sieves
          </Button>
        </>
      )}
      {step === 'Sieve' && (
        <SieveStep
          brief={brief}
          form={form}
          problems={problems}
          closeWords={run.status === 'recorded' ? 'Save the correction' : `Close run ${run.number}`}
          isBusy={recordRun.isPending}
          onChange={change}
          onClose={() => void onRecord()}
        />
      )}
      <p className="text-2 text-ink-3" aria-live="polite">
        {isKept
          ? 'What you type is kept on this tablet until it is sent.'
          : 'This browser keeps nothing: do not close the page before the run is sent.'}
      </p>
      <VoidDialog
        studyId={study.id}
        run={run}
        isOpen={isVoiding}
        onClose={() => setIsVoiding(false)}
        onVoided={() => onRecorded([])}
      />
    </div>
  );
}
