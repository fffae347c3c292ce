import type { EnvelopeJson } from '@shared/schemas/rig';
import { setPointOf, type SetPointKey } from '@shared/schemas/setPoint';
import { useWatch, type Control, type UseFormRegister } from 'react-hook-form';
import { SelectField } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { formatPlain, withUnit } from '@/lib/format';
import type { BriefForm } from './briefForm';

interface SetPointFieldsProps {
  readonly name: SetPointKey;
  readonly control: Control<BriefForm>;
  readonly register: UseFormRegister<BriefForm>;
  readonly envelope: EnvelopeJson;
}

/** One set-point: varied over a range, or held at a value. */
export function SetPointFields({ name, control, register, envelope }: SetPointFieldsProps) {
  const { name: words, unit } = setPointOf(name);
  const { min, max, step } = envelope[name];
  const use = useWatch({ control, name: `setPoints.${name}.use` });
  const range = `${withUnit(formatPlain(min), unit)} to ${withUnit(formatPlain(max), unit)}, in steps of ${withUnit(formatPlain(step), unit)}`;
  return (
    <div role="group" aria-label={words} className="grid gap-3 phone:grid-cols-4 items-start py-3">
      <SelectField
        label={words}
        options={[
          { value: 'varied', label: 'varied' },
          { value: 'held', label: 'held' },
        ]}
        hint={`The rig does ${range}.`}
        {...register(`setPoints.${name}.use`)}
      />
      {use === 'varied' ? (
        <>
          <NumberField
            control={control}
            name={`setPoints.${name}.low`}
            label={`${words} from`}
            unit={unit}
          />
          <NumberField
            control={control}
            name={`setPoints.${name}.high`}
            label={`${words} to`}
            unit={unit}
          />
          <SelectField
            label={`${words} is coded`}
            options={[
              { value: 'linear', label: 'evenly' },
              { value: 'log', label: 'by ratio (log)' },
            ]}
            {...register(`setPoints.${name}.scale`)}
          />
        </>
      ) : (
        <NumberField
          control={control}
          name={`setPoints.${name}.held`}
          label={`${words} held at`}
          unit={unit}
        />
      )}
    </div>
  );
}
