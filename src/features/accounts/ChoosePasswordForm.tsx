import { zodResolver } from '@hookform/resolvers/zod';
import { newPasswordSchema } from '@shared/schemas/text';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/Button';
import { PasswordField } from '@/components/PasswordField';
import { Notice } from '@/components/Notice';
import { showIssues } from '@/lib/formErrors';
import { useAcceptInvitation } from '@/queries/session';

const formSchema = z
  .object({ password: newPasswordSchema, again: z.string() })
  .refine(({ password, again }) => password === again, {
    path: ['again'],
    error: 'The two passwords differ.',
  });
type Form = z.infer<typeof formSchema>;

interface ChoosePasswordFormProps {
  readonly token: string;
  readonly onChosen: () => void;
}

export function ChoosePasswordForm({ token, onChosen }: ChoosePasswordFormProps) {
  const accept = useAcceptInvitation();
  const { register, handleSubmit, setError, formState } = useForm<Form>({
    resolver: zodResolver(formSchema),
  });
  const { errors } = formState;
  const onSubmit = handleSubmit(async ({ password }) => {
    try {
      await accept.mutateAsync({ token, password });
      onChosen();
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form onSubmit={(event) => void onSubmit(event)} className="grid gap-4" noValidate>
      <fieldset disabled={accept.isPending} className="grid gap-4">
        <PasswordField
          label="Password"
          autoComplete="new-password"
          hint="At least 12 characters; a sentence of your own is good."
          error={errors.password?.message}
          {...register('password')}
        />
        <PasswordField
          label="Password, once more"
          autoComplete="new-password"
          error={errors.again?.message}
          {...register('again')}
        />
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <Button type="submit" look="primary" isBusy={accept.isPending}>
          Choose this password
        </Button>
      </fieldset>
    </form>
  );
}
