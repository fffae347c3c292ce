import { zodResolver } from '@hookform/resolvers/zod';
import type { SampleJson } from '@shared/schemas/sample';
import { studyInputSchema } from '@shared/schemas/study';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/Button';
import { Field, SelectField, TextArea } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { newKey } from '@/lib/api';
import { formatMass } from '@/lib/format';
import { showIssues } from '@/lib/formErrors';
import { useOpenStudy } from '@/queries/studies';

interface NewStudyFormProps {
  readonly samples: readonly SampleJson[];
  readonly sampleId: number | null;
  readonly onOpened: (studyId: number) => void;
}

export function NewStudyForm({ samples, sampleId, onOpened }: NewStudyFormProps) {
  const openStudy = useOpenStudy();
  // one key for this form: a double click opens one study
  const [key] = useState(newKey);
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(studyInputSchema),
    defaultValues: { title: '', sampleId: sampleId ?? samples[0]?.id ?? 0, question: '' },
  });
  const { errors } = formState;
  const onSubmit = handleSubmit(async (body) => {
    try {
      const study = await openStudy.mutateAsync({ body, key });
      onOpened(study.id);
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form onSubmit={(event) => void onSubmit(event)} className="grid gap-4 max-w-form" noValidate>
      <fieldset disabled={openStudy.isPending} className="grid gap-4">
        <Field
          label="Title"
          hint="What it is about, in a few words: others find the study by it."
          error={errors.title?.message}
          {...register('title')}
        />
        <SelectField
          label="Sample"
          options={samples.map(({ id, code, name, stock }) => ({
            value: id,
            label: `${code} ${name}, ${formatMass(stock.leftG)} left`,
          }))}
          error={errors.sampleId?.message}
          {...register('sampleId', { valueAsNumber: true })}
        />
        <TextArea
          label="Question, in the customer’s words"
          error={errors.question?.message}
          {...register('question')}
        />
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <div>
          <Button type="submit" look="primary" isBusy={openStudy.isPending}>
            Open the study
          </Button>
        </div>
      </fieldset>
    </form>
  );
}
