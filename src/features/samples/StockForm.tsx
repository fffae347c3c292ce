import { zodResolver } from '@hookform/resolvers/zod';
import { stockEntryInputSchema } from '@shared/schemas/sample';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '@/components/Button';
import { Field, SelectField } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { NumberField } from '@/components/NumberField';
import { newKey } from '@/lib/api';
import { showIssues } from '@/lib/formErrors';
import { useEnterStock } from '@/queries/samples';

const KINDS = [
  { value: 'received', label: 'received more' },
  { value: 'lost', label: 'lost in splitting or handling' },
  { value: 'returned', label: 'sent back to the customer' },
];

/** An entry in the ledger by hand; reserving and using follow from the matrix and the bench. */
export function StockForm({ sampleId }: { readonly sampleId: number }) {
  const enterStock = useEnterStock(sampleId);
  const [key, setKey] = useState(newKey);
  const { register, control, handleSubmit, setError, reset, formState } = useForm({
    resolver: zodResolver(stockEntryInputSchema),
    defaultValues: { kind: 'lost' as const, note: '' },
  });
  const { errors } = formState;
  const onSubmit = handleSubmit(async (body) => {
    try {
      await enterStock.mutateAsync({ body, key });
      setKey(newKey());
      reset();
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form onSubmit={(event) => void onSubmit(event)} noValidate>
      <fieldset disabled={enterStock.isPending} className="grid gap-3">
        <SelectField label="What happened" options={KINDS} {...register('kind')} />
        <NumberField key={key} control={control} name="massG" label="Mass" unit="g" />
        <Field label="Why" error={errors.note?.message} {...register('note')} />
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <div>
          <Button type="submit" isBusy={enterStock.isPending}>
            Enter in the ledger
          </Button>
        </div>
      </fieldset>
    </form>
  );
}
