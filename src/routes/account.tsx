import { useState } from 'react';
import { roleWords } from '#workflows/revision';
import { PasswordDialog } from '../features/session/password-dialog';
import { useSession, useSignOut } from '../features/session/queries';
import { chooseTheme, useTheme } from '../lib/theme';
import { Button } from '../ui/button';
import { ConfirmDialog } from '../ui/confirm-dialog';
import { KeyFigures } from '../ui/key-figures';
import { PageBody, PageHeader, Section } from '../ui/page-header';
import { RadioGroup } from '../ui/radio-group';

export function Component() {
  const { me } = useSession();
  const { choice } = useTheme();
  const everywhere = useSignOut('everywhere');
  const [open, setOpen] = useState<'password' | 'everywhere' | null>(null);
  return (
    <>
      <PageHeader title="Your account" meta={me.email} />
      <PageBody className="flex max-w-2xl flex-col gap-8">
        <Section title="You">
          <KeyFigures
            ruled
            figures={[
              { label: 'Name', value: me.name },
              { label: 'E-mail', value: <span className="wrap-anywhere">{me.email}</span> },
              { label: 'Roles', value: me.roles.map((role) => roleWords[role]).join(', ') || 'none yet' },
            ]}
          />
          <p className="text-graphite">An administrator can change these.</p>
        </Section>
        <Section title="Password">
          <p>
            It signs you in, and it signs your approvals, results and releases. Changing it ends your other sessions.
          </p>
          <Button className="self-start" onPress={() => setOpen('password')}>
            Change password
          </Button>
        </Section>
        <Section title="Appearance">
          <RadioGroup
            label="Theme"
            hint="Remembered on this device."
            choices={[
              { value: 'light', label: 'Light' },
              { value: 'dark', label: 'Dark' },
              { value: 'system', label: 'As the system' },
            ]}
            value={choice}
            onChange={(next) => {
              if (next !== '') chooseTheme(next);
            }}
          />
        </Section>
        <Section title="Sessions">
          <p>If a device with your session is lost, end all of them here; you sign in again to go on.</p>
          <Button className="self-start" onPress={() => setOpen('everywhere')}>
            Sign out everywhere
          </Button>
        </Section>
      </PageBody>
      {open === 'password' ? <PasswordDialog onClose={() => setOpen(null)} /> : null}
      <ConfirmDialog
        title="Sign out everywhere"
        confirmLabel="Sign out everywhere"
        isOpen={open === 'everywhere'}
        onClose={() => setOpen(null)}
        onConfirm={() => everywhere.mutateAsync()}
      >
        <p>Ends your session on this and every other device.</p>
      </ConfirmDialog>
    </>
  );
}
