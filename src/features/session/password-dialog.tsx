import { useMutation } from '@tanstack/react-query';
import { useId } from 'react';
import { useForm } from 'react-hook-form';
import { PasswordChange, passwordLength, sessionRoutes } from '#contracts/session';
import { callRoute } from '../../lib/fetch-json';
import { Button } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { PasswordField } from '../../ui/text-field';
import { tell } from '../../ui/toast';

interface PasswordForm extends PasswordChange {
  repeated: string;
}

/** Changes the own password; other devices are signed out by it. */
export function PasswordDialog({ onClose }: { onClose: () => void }) {
  const form = useForm<PasswordForm>({ defaultValues: { currentPassword: '', newPassword: '', repeated: '' } });
  const change = useMutation({
    mutationFn: (body: PasswordChange) => callRoute(sessionRoutes.changePassword, { body }),
  });
  const formId = useId();
  const submit = form.handleSubmit(async ({ repeated, ...values }) => {
    const checked = PasswordChange.safeParse(values);
    if (!checked.success) {
      checked.error.issues.forEach((issue, index) => {
        const name = issue.path[0] === 'currentPassword' ? 'currentPassword' : 'newPassword';
        form.setError(name, { message: issue.message }, { shouldFocus: index === 0 });
      });
      return;
    }
    if (repeated !== values.newPassword) {
      form.setError('repeated', { message: 'This is not the same as the new password.' }, { shouldFocus: true });
      return;
    }
    try {
      await change.mutateAsync(checked.data);
      tell.done('Password changed', { detail: 'Your other devices have been signed out.' });
      onClose();
    } catch (error) {
      applyIssues(form, error);
    }
  });
  return (
    <Dialog
      title="Change your password"
      isOpen
      onClose={onClose}
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button variant="primary" type="submit" form={formId} pending={change.isPending}>
            Change password
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label="Change your password">
        <FormError message={form.formState.errors.root?.message} />
        <FormField control={form.control} name="currentPassword">
          {(bind) => <PasswordField label="Current password" autoComplete="current-password" autoFocus {...bind} />}
        </FormField>
        <FormField control={form.control} name="newPassword">
          {(bind) => (
            <PasswordField
              label="New password"
              autoComplete="new-password"
              hint={`At least ${passwordLength.least} characters. A few unrelated words are easy to remember.`}
              {...bind}
            />
          )}
        </FormField>
        <FormField control={form.control} name="repeated">
          {(bind) => <PasswordField label="New password, once more" autoComplete="new-password" {...bind} />}
        </FormField>
      </Form>
    </Dialog>
  );
}
