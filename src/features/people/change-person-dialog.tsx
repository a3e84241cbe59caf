import { useId, useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { PersonChange } from '#contracts/people';
import type { Person } from '#contracts/people';
import type { Change } from '#contracts/error';
import { formatAgo } from '../../lib/format';
import { isRequestError, RequestError } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Caution } from '../../ui/caution';
import { Checkbox, CheckboxGroup } from '../../ui/checkbox';
import { Dialog } from '../../ui/dialog';
import { applyIssues, Form, FormError, FormField } from '../../ui/form';
import { TextField } from '../../ui/text-field';
import { tell } from '../../ui/toast';
import { useChangePerson } from './queries';
import { roleChoices } from './role-choices';

type Fields = Omit<PersonChange, 'version'>;

interface ChangePersonDialogProps {
  person: Person;
  /** The administrator who changes it. */
  isSelf: boolean;
  onClose: () => void;
}

export function ChangePersonDialog({ person, isSelf, onClose }: ChangePersonDialogProps) {
  const [version, setVersion] = useState(person.version);
  const [changed, setChanged] = useState<Change[] | null>(null);
  const form = useForm<Fields>({
    defaultValues: { name: person.name, email: person.email, roles: person.roles, active: person.active },
  });
  const change = useChangePerson(person.id);
  const formId = useId();
  const active = useWatch({ control: form.control, name: 'active' });
  const submit = form.handleSubmit(async (fields) => {
    const parsed = PersonChange.safeParse({ version, ...fields, email: fields.email.trim() });
    try {
      if (!parsed.success) {
        const issues = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
        throw new RequestError(422, 'invalid', 'Not complete.', { issues });
      }
      const saved = await change.mutateAsync(parsed.data);
      tell.done(`${saved.name} saved`);
      onClose();
    } catch (error) {
      if (isRequestError(error, 'conflict')) setChanged(error.changed);
      applyIssues(form, error);
    }
  });
  return (
    <Dialog
      title={`Change ${person.name}`}
      isOpen
      onClose={onClose}
      role="alertdialog"
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button
            variant="primary"
            type="submit"
            form={formId}
            pending={change.isPending}
            disabled={changed !== null && version !== person.version}
          >
            Save
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label="Person">
        <FormError message={form.formState.errors.root?.message} />
        {changed === null ? null : (
          <div className="flex flex-col items-start gap-2">
            <ul className="list-disc pl-5">
              {changed.map((each) => (
                <li key={`${each.version} ${each.at}`}>
                  {each.what} ({each.by ?? 'the server'}, {formatAgo(each.at)})
                </li>
              ))}
            </ul>
            <Button
              size="small"
              onPress={() => {
                setVersion(person.version);
                setChanged(null);
                form.clearErrors();
              }}
            >
              Keep my text and go on from the current state
            </Button>
          </div>
        )}
        <FormField control={form.control} name="name">
          {(bind) => <TextField label="Name" required autoComplete="off" {...bind} />}
        </FormField>
        <FormField control={form.control} name="email">
          {(bind) => <TextField label="E-mail" type="email" required autoComplete="off" {...bind} />}
        </FormField>
        <FormField control={form.control} name="roles">
          {(bind) => <CheckboxGroup label="Roles" choices={roleChoices} {...bind} />}
        </FormField>
        <FormField control={form.control} name="active">
          {(bind) => (
            <Checkbox
              label="May sign in"
              hint="Without it the person is signed out everywhere; signatures and history keep the name."
              {...bind}
            />
          )}
        </FormField>
        {isSelf && !active ? (
          <Caution title="This is your own account.">You would sign yourself out for good.</Caution>
        ) : null}
      </Form>
    </Dialog>
  );
}
