import type { SieveStackJson } from '@shared/schemas/rig';
import { useWatch, type Control, type FieldErrors, type UseFormRegister } from 'react-hook-form';
import { Button } from '@/components/Button';
import { Field, SelectField } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { formatAperture } from '@/lib/format';
import type { BriefForm } from './briefForm';

const AIMS = [
  { value: 'maximise', label: 'at least' },
  { value: 'minimise', label: 'at most' },
  { value: 'target', label: 'a target' },
  { value: 'within', label: 'within a range' },
  { value: 'observe', label: 'observe only' },
];

/** What the two limits mean, by aim. */
const LIMIT_WORDS: Readonly<Record<string, readonly [string, string]>> = {
  maximise: ['at least', 'best from'],
  minimise: ['best below', 'at most'],
  target: ['not below', 'not above'],
  within: ['from', 'to'],
};

const KIND_WORDS: Readonly<Record<string, string>> = {
  passing: 'derived from the sieves',
  size: 'derived from the sieves',
  specificEnergy: 'computed from the settings',
  duration: 'computed from the settings',
  measured: 'measured and typed',
};

interface ResponseFieldsProps {
  readonly index: number;
  readonly control: Control<BriefForm>;
  readonly register: UseFormRegister<BriefForm>;
  readonly errors: FieldErrors<BriefForm>;
  readonly stack: SieveStackJson | undefined;
  readonly onRemove: () => void;
}

/** One response with its goal. */
export function ResponseFields(props: ResponseFieldsProps) {
  const { index, control, register, errors, stack, onRemove } = props;
  const response = useWatch({ control, name: `responses.${index}` });
  const at = `responses.${index}` as const;
  const own = errors.responses?.[index];
  const limits = LIMIT_WORDS[response.aim];
  return (
    <div
      role="group"
      aria-label={`Response ${index + 1}`}
      className="grid gap-3 py-4 border-b border-line"
    >
      <div className="grid gap-3 phone:grid-cols-4 items-start">
        <Field
          label="Response"
          hint={KIND_WORDS[response.kind]}
          error={own?.name?.message}
          {...register(`${at}.name`)}
        />
        {response.kind === 'passing' && (
          <SelectField
            label="that passes"
            options={(stack?.aperturesMm ?? []).map((mm) => ({
              value: mm,
              label: formatAperture(mm),
            }))}
            error={own?.apertureMm?.message}
            {...register(`${at}.apertureMm`, { valueAsNumber: true })}
          />
        )}
        {response.kind === 'size' && (
          <NumberField control={control} name={`${at}.percent`} label="that lets pass" unit="%" />
        )}
        {response.kind === 'measured' && (
          <Field label="Unit" error={own?.unit?.message} {...register(`${at}.unit`)} />
        )}
        <SelectField label="should be" options={AIMS} {...register(`${at}.aim`)} />
      </div>
      <div className="grid gap-3 phone:grid-cols-4 items-start">
        {limits && (
          <>
            <NumberField
              control={control}
              name={`${at}.low`}
              label={limits[0]}
              unit={response.unit}
            />
            {response.aim === 'target' && (
              <NumberField
                control={control}
                name={`${at}.target`}
                label="target"
                unit={response.unit}
              />
            )}
            <NumberField
              control={control}
              name={`${at}.high`}
              label={limits[1]}
              unit={response.unit}
            />
            <NumberField
              control={control}
              name={`${at}.priority`}
              label="weighs"
              hint="1 is usual"
            />
          </>
        )}
        <div className="self-end">
          <Button look="quiet" onClick={onRemove}>
            Remove<span className="sr-only"> {response.name}</span>
          </Button>
        </div>
      </div>
    </div>
  );
}
