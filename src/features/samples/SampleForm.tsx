import { zodResolver } from '@hookform/resolvers/zod';
import type { CustomerJson } from '@shared/schemas/account';
import { HARD_TO_BREAK, NEVER_IN, sampleInputSchema } from '@shared/schemas/sample';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { z } from 'zod';
import { Button } from '@/components/Button';
import { Checkbox, Field, SelectField, TextArea } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { NumberField } from '@/components/NumberField';
import { Panel } from '@/components/Panel';
import { newKey } from '@/lib/api';
import { showIssues } from '@/lib/formErrors';
import { optionalId } from '@/lib/optionalId';
import { useRegisterSample } from '@/queries/samples';

interface SampleFormProps {
  readonly customers: readonly CustomerJson[];
  readonly onRegistered: (sampleId: number) => void;
}

const today = () => new Date().toISOString().slice(0, 10);

export function SampleForm({ customers, onRegistered }: SampleFormProps) {
  const registerSample = useRegisterSample();
  const [key] = useState(newKey);
  const { register, control, handleSubmit, setError, formState, watch } = useForm<
    z.input<typeof sampleInputSchema>,
    unknown,
    z.output<typeof sampleInputSchema>
  >({
    resolver: zodResolver(sampleInputSchema),
    defaultValues: {
      name: '',
      customerId: null,
      material: '',
      description: '',
      receivedOn: today(),
      feedFromMm: null,
      feedToMm: null,
      moisturePercent: null,
      storage: '',
      found: [],
      cautions: [],
    },
  });
  const { errors } = formState;
  const found = watch('found') ?? [];
  const onSubmit = handleSubmit(async (body) => {
    try {
      const sample = await registerSample.mutateAsync({ body, key });
      onRegistered(sample.id);
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form
      onSubmit={(event) => void onSubmit(event)}
      className="grid gap-4 desk:grid-cols-2 items-start"
      noValidate
    >
      <fieldset disabled={registerSample.isPending} className="contents">
        <Panel name="What arrived">
          <div className="grid gap-4">
            <Field label="Name" error={errors.name?.message} {...register('name')} />
            <Field label="Material" error={errors.material?.message} {...register('material')} />
            <SelectField
              label="Customer"
              options={[
                { value: '', label: 'the lab itself' },
                ...customers.map(({ id, name }) => ({ value: id, label: name })),
              ]}
              error={errors.customerId?.message}
              {...register('customerId', {
                setValueAs: optionalId,
              })}
            />
            <div className="grid phone:grid-cols-2 gap-4">
              <NumberField
                control={control}
                name="receivedMassG"
                label="Mass received"
                unit="g"
                hint="kg are read too: 12.4 kg"
              />
              <Field
                label="Day of receipt"
                type="date"
                error={errors.receivedOn?.message}
                {...register('receivedOn')}
              />
              <NumberField control={control} name="feedFromMm" label="Feed from" unit="mm" />
              <NumberField control={control} name="feedToMm" label="Feed to" unit="mm" />
              <NumberField control={control} name="moisturePercent" label="Moisture" unit="%" />
              <Field
                label="Where it is kept"
                error={errors.storage?.message}
                {...register('storage')}
              />
            </div>
            <TextArea
              label="Description"
              error={errors.description?.message}
              {...register('description')}
            />
          </div>
        </Panel>
        <div className="grid gap-4">
          <Panel name="Never in the vessel" fact="tick what you found">
            <div className="grid gap-1">
              <p className="text-2 text-ink-3">
                Common practice, no source; the maker’s manual and local rules go first. A sample
                with any of these is refused, and nobody can override it.
              </p>
              {NEVER_IN.map(({ key: item, label, why }) => (
                <Checkbox
                  key={item}
                  value={item}
                  label={
                    <>
                      {label} <span className="text-ink-3">{why}</span>
                    </>
                  }
                  {...register('found')}
                />
              ))}
              {(found.length > 0 || errors.found) && (
                <Notice tone="stop" claim="This sample cannot be taken in.">
                  {errors.found?.message ??
                    errors.found?.root?.message ??
                    'Take the part out, or send it back.'}
                </Notice>
              )}
            </div>
          </Panel>
          <Panel name="Will hardly break" fact="a caution, not a refusal">
            <div className="grid gap-1">
              {HARD_TO_BREAK.map(({ key: item, label, why }) => (
                <Checkbox
                  key={item}
                  value={item}
                  label={
                    <>
                      {label} <span className="text-ink-3">{why}</span>
                    </>
                  }
                  {...register('cautions')}
                />
              ))}
            </div>
          </Panel>
          <Checkbox
            label="I have looked the sample through for everything in these lists."
            error={errors.screened?.message}
            {...register('screened')}
          />
          {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
          <div>
            <Button type="submit" look="primary" isBusy={registerSample.isPending}>
              Register the sample
            </Button>
          </div>
        </div>
      </fieldset>
    </form>
  );
}
