import { zodResolver } from '@hookform/resolvers/zod';
import { signInSchema, type SignIn } from '@steepfall/shared/contracts';
import { useForm } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { PasswordField, TextField } from '#components/field.tsx';
import { HubProblemError, HubUnreachableError } from '#lib/http.ts';
import { signIn } from '#lib/session.ts';

function wordsFor(error: unknown): { field: 'password' | 'root'; message: string } {
  if (error instanceof HubUnreachableError) {
    return {
      field: 'root',
      message:
        'The hub does not answer. Check that it is on and that this device is on the same network, then try again.',
    };
  }
  if (error instanceof HubProblemError) {
    if (error.type === 'wrong-credentials') {
      return { field: 'password', message: 'E-mail or password is wrong. Check both, then try again.' };
    }
    return { field: 'root', message: `${error.problem.title}. ${error.problem.detail}` };
  }
  return { field: 'root', message: 'Something went wrong on this device. Try again.' };
}

export function SignInForm() {
  const { register, handleSubmit, setError, setFocus, formState } = useForm<SignIn>({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: '', password: '' },
  });
  const { errors, isSubmitting } = formState;
  const submit = handleSubmit(async (credentials) => {
    try {
      await signIn(credentials);
    } catch (error) {
      const { field, message } = wordsFor(error);
      setError(field, { message });
      if (field === 'password') setFocus('password', { shouldSelect: true });
    }
  });
  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="mt-8 grid gap-6">
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        inputMode="email"
        autoCapitalize="none"
        spellCheck={false}
        error={errors.email?.message}
        {...register('email')}
      />
      <PasswordField
        label="Password"
        autoComplete="current-password"
        error={errors.password?.message}
        {...register('password')}
      />
      {errors.root?.message ? (
        <p role="alert" className="border-l-8 border-ember-line bg-raised px-4 py-3 text-body">
          {errors.root.message}
        </p>
      ) : null}
      <Button look="primary" type="submit" isBusy={isSubmitting} busyLabel="Signing in" className="min-h-14">
        Sign in
      </Button>
    </form>
  );
}
