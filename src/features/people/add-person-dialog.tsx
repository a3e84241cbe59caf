import { useId } from 'react';
import { useForm } from 'react-hook-form';
import { PersonCreate } from '#contracts/people';
import { passwordLength } from '#contracts/session';
import { RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { CheckboxGroup } from '../../ui/checkbox';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { PasswordField, TextField } from '../../ui/text-field';
import { tell } from '../../ui/toast';
import { useCreatePerson } from './queries';
import { roleChoices } from './role-choices';

export function AddPersonDialog({ onClose }: { onClose: () => void }) {
  const form = useForm<PersonCreate>({ defaultValues: { name: '', email: '', roles: [], initialPassword: '' } });
  const create = useCreatePerson();
  const formId = useId();
  const submit = form.handleSubmit(async (fields) => {
    const parsed = PersonCreate.safeParse({ ...fields, email: fields.email.trim() });
    try {
      if (!parsed.success) {
        const issues = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
        throw new RequestError(422, 'invalid', 'Not complete.', { issues });
      }
      const person = await create.mutateAsync(parsed.data);
      tell.done(`${person.name} added`);
      onClose();
    } catch (error) {
      applyIssues(form, error);
    }
  });
  return (
    <Dialog
      title="Add a person"
      isOpen
      onClose={onClose}
      role="alertdialog"
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button variant="primary" type="submit" form={formId} pending={create.isPending}>
            Add the person
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label="Person">
        <FormError message={form.formState.errors.root?.message} />
        <FormField control={form.control} name="name">
          {(bind) => (
            <TextField
              label="Name"
              required
              autoFocus
              autoComplete="off"
              hint="As it is to stand under signatures."
              {...bind}
            />
          )}
        </FormField>
        <FormField control={form.control} name="email">
          {(bind) => <TextField label="E-mail" type="email" required autoComplete="off" {...bind} />}
        </FormField>
        <FormField control={form.control} name="roles">
          {(bind) => <CheckboxGroup label="Roles" choices={roleChoices} {...bind} />}
        </FormField>
        <FormField control={form.control} name="initialPassword">
          {(bind) => (
            <PasswordField
              label="First password"
              autoComplete="new-password"
              required
              hint={`At least ${passwordLength.least} characters. Hand it over in person; only its owner can change it afterwards.`}
              {...bind}
            />
          )}
        </FormField>
      </Form>
    </Dialog>
  );
}
