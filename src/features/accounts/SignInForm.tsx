import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { PasswordField } from '@/components/PasswordField';
import { Notice } from '@/components/Notice';
import { showIssues } from '@/lib/formErrors';
import { useSignIn } from '@/queries/session';

const formSchema = z.object({
  email: z.string().min(1, 'Enter your e-mail address.'),
  password: z.string().min(1, 'Enter your password.'),
});
type Form = z.infer<typeof formSchema>;

export function SignInForm({ onSignedIn }: { readonly onSignedIn: () => void }) {
  const signIn = useSignIn();
  const { register, handleSubmit, setError, formState } = useForm<Form>({
    resolver: zodResolver(formSchema),
  });
  const { errors } = formState;
  const onSubmit = handleSubmit(async (form) => {
    try {
      await signIn.mutateAsync(form);
      onSignedIn();
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form onSubmit={(event) => void onSubmit(event)} className="grid gap-4" noValidate>
      <fieldset disabled={signIn.isPending} className="grid gap-4">
        <Field
          label="E-mail"
          type="email"
          autoComplete="username"
          error={errors.email?.message}
          {...register('email')}
        />
        <PasswordField
          label="Password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...register('password')}
        />
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <Button type="submit" look="primary" isBusy={signIn.isPending}>
          Sign in
        </Button>
      </fieldset>
    </form>
  );
}
