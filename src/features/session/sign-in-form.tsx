import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { SignIn, sessionRoutes } from '#contracts/session';
import type { SessionAnswer } from '#contracts/session';
import { callRoute } from '../../lib/fetch-json';
import { isRequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { PasswordField, TextField } from '../../ui/text-field';

interface SignInFormProps {
  onSignedIn: (answer: SessionAnswer) => void;
  /** The address is known where somebody signs in again. */
  email?: string;
}

function waitWords(seconds: number | undefined): string {
  if (seconds === undefined) return 'Wait a few minutes, then try again.';
  return seconds < 90
    ? `Try again in ${Math.max(1, Math.ceil(seconds))} s.`
    : `Try again in ${Math.ceil(seconds / 60)} min.`;
}

/** Address and password; errors stand at their fields, and what was typed stays. */
export function SignInForm({ onSignedIn, email }: SignInFormProps) {
  const form = useForm<SignIn>({ defaultValues: { email: email ?? '', password: '' } });
  const signIn = useMutation({ mutationFn: (body: SignIn) => callRoute(sessionRoutes.signIn, { body }) });
  const submit = form.handleSubmit(async (values) => {
    const checked = SignIn.safeParse(values);
    if (!checked.success) {
      checked.error.issues.forEach((issue, index) => {
        const name = issue.path[0] === 'password' ? 'password' : 'email';
        form.setError(name, { message: issue.message }, { shouldFocus: index === 0 });
      });
      return;
    }
    try {
      onSignedIn(await signIn.mutateAsync(checked.data));
    } catch (error) {
      if (isRequestError(error, 'unauthenticated')) {
        form.setError('password', { message: error.message }, { shouldFocus: true });
      } else if (isRequestError(error, 'tooMany')) {
        form.setError('root', { message: `${error.message} ${waitWords(error.retryAfterSeconds)}` });
      } else applyIssues(form, error);
    }
  });
  return (
    <Form onSubmit={() => void submit()} label="Sign in">
      <FormError message={form.formState.errors.root?.message} />
      <FormField control={form.control} name="email">
        {(bind) => (
          <TextField
            label="E-mail address"
            type="email"
            inputMode="email"
            autoComplete="username"
            autoFocus={email === undefined}
            readOnly={email !== undefined}
            {...bind}
          />
        )}
      </FormField>
      <FormField control={form.control} name="password">
        {(bind) => (
          <PasswordField label="Password" autoComplete="current-password" autoFocus={email !== undefined} {...bind} />
        )}
      </FormField>
      <Button type="submit" variant="primary" pending={signIn.isPending} className="mt-1 w-full">
        Sign in
      </Button>
    </Form>
  );
}
