import {
  briefInputSchema,
  PRACTICE_MATERIALS,
  studyJsonSchema,
  type StudyJson,
} from '@shared/schemas/study';
import { RESPONSE_KINDS, type ResponseKind } from '@shared/schemas/response';
import type { RigJson, SieveStackJson } from '@shared/schemas/rig';
import { SET_POINT_KEYS } from '@shared/schemas/setPoint';
import { useState } from 'react';
import { useFieldArray, useForm, useWatch, type FieldPath } from 'react-hook-form';
import { Button } from '@/components/Button';
import { Field, SelectField, TextArea } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { NumberField } from '@/components/NumberField';
import { Panel } from '@/components/Panel';
import { ApiError } from '@/lib/api';
import { useSaveBrief } from '@/queries/studies';
import { briefOf, formOf, newResponse, placeOf, type BriefForm } from './briefForm';
import { ResponseFields } from './ResponseFields';
import { SetPointFields } from './SetPointFields';

const KIND_NAMES: Readonly<Record<ResponseKind, string>> = {
  passing: 'Passing at a size',
  size: 'Size at a passing',
  specificEnergy: 'Specific energy',
  duration: 'Duration',
  measured: 'Measured by hand',
};

interface BriefEditorProps {
  readonly study: StudyJson;
  readonly rigs: readonly RigJson[];
  readonly stacks: readonly SieveStackJson[];
  readonly onSaved: () => void;
}

interface Stale {
  readonly by: StudyJson;
}

/** Somebody saved meanwhile: their version beside this one, and nothing typed is lost. */
function StaleNotice({ by, onKeepMine }: Stale & { readonly onKeepMine: () => void }) {
  return (
    <Notice tone="caution" claim="Somebody saved this Brief since you opened it.">
      Theirs: “{by.title}”,{' '}
      {by.brief?.factors.map(({ key, low, high }) => `${key} ${low}–${high}`).join(', ')};{' '}
      {by.brief?.responses.map(({ name }) => name).join(', ')}. Yours is still in the form.{' '}
      <button type="button" className="link" onClick={onKeepMine}>
        Save mine over theirs
      </button>
    </Notice>
  );
}

export function BriefEditor({ study, rigs, stacks, onSaved }: BriefEditorProps) {
  const saveBrief = useSaveBrief(study.id);
  const [stale, setStale] = useState<Stale | null>(null);
  // the version this form was filled from: a refetch in the background must not hide a conflict
  const [version, setVersion] = useState(study.version);
  const { register, control, handleSubmit, setError, clearErrors, formState } = useForm<BriefForm>({
    defaultValues: formOf(study, rigs, stacks),
  });
  const { errors } = formState;
  const { fields, append, remove } = useFieldArray({ control, name: 'responses' });
  const rigId = useWatch({ control, name: 'rigId' });
  const stackId = useWatch({ control, name: 'sieveStackId' });
  const responses = useWatch({ control, name: 'responses' });
  const rig = rigs.find(({ id }) => id === rigId) ?? rigs[0];
  const stack = stacks.find(({ id }) => id === stackId);

  const show = (issues: readonly { path: string; message: string }[], form: BriefForm) => {
    for (const { path, message } of issues)
      setError(placeOf(path, form) as FieldPath<BriefForm>, { message });
    const [first] = issues;
    setError('root', {
      message:
        issues.length === 1
          ? (first?.message ?? '')
          : `${issues.length} things need attention: ${first?.message ?? ''}`,
    });
  };

  const save = async (form: BriefForm, atVersion: number) => {
    clearErrors();
    const parsed = briefInputSchema.safeParse(briefOf(form, study.sample.id));
    if (!parsed.success) {
      show(
        parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message })),
        form,
      );
      return;
    }
    try {
      const saved = await saveBrief.mutateAsync({ brief: parsed.data, version: atVersion });
      setVersion(saved.version);
      setStale(null);
      onSaved();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      const theirs = studyJsonSchema.safeParse(error.current);
      if (error.code === 'stale' && theirs.success) setStale({ by: theirs.data });
      else
        show(
          error.issues.length > 0 ? error.issues : [{ path: 'root', message: error.message }],
          form,
        );
    }
  };

  if (!rig) return <Notice tone="caution">The lab has no rig yet; an admin registers one.</Notice>;
  return (
    <form
      onSubmit={(event) => void handleSubmit((form) => save(form, version))(event)}
      className="grid gap-4"
      noValidate
    >
      <fieldset disabled={saveBrief.isPending} className="grid gap-4">
        {stale && (
          <StaleNotice
            by={stale.by}
            onKeepMine={() => {
              void handleSubmit((form) => save(form, stale.by.version))();
            }}
          />
        )}
        <div className="grid gap-4 desk:grid-cols-2 items-start">
          <Panel name="Question" fact={`on ${study.sample.code} ${study.sample.name}`}>
            <div className="grid gap-4">
              <Field label="Title" error={errors.title?.message} {...register('title')} />
              <TextArea
                label="Question, in the customer’s words"
                error={errors.question?.message}
                {...register('question')}
              />
            </div>
          </Panel>
          <Panel name="Rig, sieves and bags">
            <div className="grid gap-4 phone:grid-cols-2">
              <SelectField
                label="Rig"
                options={rigs.map(({ id, name, revision }) => ({
                  value: id,
                  label: `${name}, envelope rev. ${revision}`,
                }))}
                {...register('rigId', { valueAsNumber: true })}
              />
              <SelectField
                label="Sieve stack"
                options={stacks.map(({ id, name }) => ({ value: id, label: name }))}
                {...register('sieveStackId', { valueAsNumber: true })}
              />
              <NumberField control={control} name="batchMassG" label="Mass of one bag" unit="g" />
              <NumberField
                control={control}
                name="handlingMinutes"
                label="Handling of one run"
                unit="min"
                hint="set-up, emptying, rinsing, sieving"
              />
            </div>
          </Panel>
        </div>
        <Panel name="Set-points" fact="two to four are varied, the rest is held">
          <div className="grid">
            {SET_POINT_KEYS.map((key) => (
              <SetPointFields
                key={key}
                name={key}
                control={control}
                register={register}
                envelope={rig.envelope}
              />
            ))}
          </div>
        </Panel>
        <Panel name="Responses and goals" fact="what the product should be">
          {fields.map((field, index) => (
            <ResponseFields
              key={field.id}
              index={index}
              control={control}
              register={register}
              errors={errors}
              stack={stack}
              onRemove={() => remove(index)}
            />
          ))}
          <div className="flex flex-wrap gap-2 pt-4" role="group" aria-label="Add a response">
            {RESPONSE_KINDS.map((kind) => (
              <Button
                key={kind}
                onClick={() =>
                  append(
                    newResponse(
                      kind,
                      responses.map(({ key }) => key),
                    ),
                  )
                }
              >
                Add: {KIND_NAMES[kind]}
              </Button>
            ))}
          </div>
        </Panel>
        <Panel name="Limits and expectations" fact="all optional">
          <div className="grid gap-4 phone:grid-cols-3">
            <NumberField control={control} name="runLimit" label="At most so many runs" />
            <NumberField
              control={control}
              name="massLimitG"
              label="At most so much sample"
              unit="g"
            />
            <NumberField control={control} name="dayLimit" label="At most so many days" />
            <NumberField
              control={control}
              name="effectThatMatters"
              label="Smallest change that matters"
              hint="of the first response, from low to high"
            />
            <NumberField
              control={control}
              name="expectedSpread"
              label="Run-to-run spread expected"
              hint="with both, plans show their chance to find it"
            />
            <SelectField
              label="Rehearse on the practice rig"
              options={[
                { value: '', label: 'no, the real rig' },
                ...PRACTICE_MATERIALS.map((name) => ({
                  value: name,
                  label: `${name}-like, invented`,
                })),
              ]}
              {...register('practiceMaterial')}
            />
          </div>
        </Panel>
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <div className="flex gap-2">
          <Button type="submit" look="primary" isBusy={saveBrief.isPending}>
            Save the Brief
          </Button>
        </div>
      </fieldset>
    </form>
  );
}
