import { useId, useState } from 'react';
import type { ReactNode } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from './button';
import { Dialog } from './dialog';
import { applyIssues, Form, FormError, FormField } from './form';
import { TextArea } from './text-area';
import { PasswordField } from './text-field';

interface Given {
  reason: string;
  password: string;
}

export interface ConfirmDialogProps {
  title: string;
  isOpen: boolean;
  onClose: () => void;
  /** What will happen, and what cannot be undone. */
  children?: ReactNode;
  /** The verb on the button. */
  confirmLabel: string;
  danger?: boolean;
  /** Asks for words: a reason, a remark, a shortfall. */
  reason?: { label: string; hint?: string; required?: boolean; maxLength?: number };
  /** Asks for the password again, as a signature does; `meaning` says what is signed. */
  password?: boolean;
  meaning?: string;
  /** Does it. Rejecting keeps the dialog and what was typed, and shows why; the server's issues stand at their fields. */
  onConfirm: (given: Given) => Promise<unknown>;
  /** Names of the request's fields where they are not `reason` and `password`. */
  paths?: { reason?: string; password?: string };
}

/** Asks before something is done that matters: plainly, with a reason, or as a signature. */
export function ConfirmDialog(props: ConfirmDialogProps) {
  return props.isOpen ? <OpenConfirmDialog {...props} /> : null;
}

function OpenConfirmDialog(props: ConfirmDialogProps) {
  const { title, onClose, children, confirmLabel, danger, reason, password, meaning, onConfirm, paths } = props;
  const form = useForm<Given>({ defaultValues: { reason: '', password: '' } });
  const [busy, setBusy] = useState(false);
  const formId = useId();
  const submit = form.handleSubmit(async (given) => {
    let complete = true;
    if (reason?.required && given.reason.trim() === '') {
      form.setError('reason', { message: `${reason.label}: say it in words.` }, { shouldFocus: complete });
      complete = false;
    }
    if (password && given.password === '') {
      form.setError('password', { message: 'Give your password: it signs this.' }, { shouldFocus: complete });
      complete = false;
    }
    if (!complete) return;
    setBusy(true);
    try {
      await onConfirm({ reason: given.reason.trim(), password: given.password });
      onClose();
    } catch (error) {
      applyIssues(form, error, {
        rename: (path) => (path === paths?.reason ? 'reason' : path === paths?.password ? 'password' : path),
      });
    } finally {
      setBusy(false);
    }
  });
  return (
    <Dialog
      title={title}
      isOpen
      onClose={onClose}
      role="alertdialog"
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button variant={danger ? 'danger' : 'primary'} type="submit" form={formId} pending={busy}>
            {confirmLabel}
          </Button>
        </>
      }
    >
      <Form id={formId} onSubmit={() => void submit()} label={title}>
        {children ? <div className="flex flex-col gap-2">{children}</div> : null}
        {meaning ? (
          <blockquote className="border-l-[3px] border-copper bg-wash px-3.5 py-2.5">{meaning}</blockquote>
        ) : null}
        <FormError message={form.formState.errors.root?.message} />
        {reason ? (
          <FormField control={form.control} name="reason">
            {(bind) => (
              <TextArea
                label={reason.label}
                hint={reason.hint}
                required={reason.required}
                maxLength={reason.maxLength}
                autoFocus
                {...bind}
              />
            )}
          </FormField>
        ) : null}
        {password ? (
          <FormField control={form.control} name="password">
            {(bind) => (
              <PasswordField
                label="Your password"
                hint="Entered again because this is a signature."
                autoComplete="current-password"
                autoFocus={!reason}
                {...bind}
              />
            )}
          </FormField>
        ) : null}
      </Form>
    </Dialog>
  );
}
