import { zodResolver } from '@hookform/resolvers/zod';
import { MEANING, releaseInputSchema } from '@shared/schemas/release';
import type { SettingJson } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { z } from 'zod';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { PasswordField } from '@/components/PasswordField';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { newKey } from '@/lib/api';
import { showIssues } from '@/lib/formErrors';
import { useSignRelease } from '@/queries/releases';

const formSchema = releaseInputSchema.omit({ settings: true, version: true });
type Form = z.input<typeof formSchema>;

interface SignFormProps {
  readonly study: StudyJson;
  readonly setting: SettingJson;
  readonly onSigned: () => void;
}

const words = ({ voltage, gap, pulses, frequency }: SettingJson) =>
  `${voltage} kV, ${gap} mm, ${pulses} pulses, ${frequency} Hz`;

/** The signature: it asks for the password again, and what it seals is never changed. */
export function SignForm({ study, setting, onSigned }: SignFormProps) {
  const sign = useSignRelease(study.id);
  const [key, setKey] = useState(newKey);
  const { register, handleSubmit, setError, formState } = useForm<Form>({
    resolver: zodResolver(formSchema),
    defaultValues: {
      purpose: '',
      decisionRule:
        'mean of the confirmation runs inside the 95 % prediction interval; every bag meets every goal',
      validUntil: null,
      password: '',
    },
  });
  const { errors } = formState;
  const onSubmit = handleSubmit(async (form) => {
    try {
      await sign.mutateAsync({ ...form, settings: setting, version: study.version, key });
      onSigned();
    } catch (error) {
      // a refused signature is another request next time
      setKey(newKey());
      showIssues(error, setError);
    }
  });
  return (
    <Panel name="Signature" fact={words(setting)}>
      <form onSubmit={(event) => void onSubmit(event)} noValidate>
        <fieldset disabled={sign.isPending} className="grid gap-4">
          <Field label="For what use?" error={errors.purpose?.message} {...register('purpose')} />
          <Field
            label="Decision rule"
            error={errors.decisionRule?.message}
            {...register('decisionRule')}
          />
          <Field
            label="Valid until"
            type="date"
            hint="empty: until withdrawn"
            error={errors.validUntil?.message}
            {...register('validUntil', { setValueAs: (value: string) => value || null })}
          />
          <PasswordField
            label="Your password, to sign"
            autoComplete="current-password"
            error={errors.password?.message}
            {...register('password')}
          />
          <p className="text-2 text-ink-2">“{MEANING}”</p>
          {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
          <div>
            <Button type="submit" look="primary" isBusy={sign.isPending}>
              Sign the release
            </Button>
          </div>
        </fieldset>
      </form>
    </Panel>
  );
}
