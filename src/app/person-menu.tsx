import { KeyRound, LogOut, MonitorX, User, UserRound } from 'lucide-react';
import { useState } from 'react';
import type { Me } from '#contracts/session';
import { roleWords } from '#workflows/revision';
import { PasswordDialog } from '../features/session/password-dialog';
import { useSignOut } from '../features/session/queries';
import { messageOf } from '../lib/request-error';
import { chooseTheme, useTheme } from '../lib/theme';
import type { ThemeChoice } from '../lib/theme';
import { Button, IconButton } from '../ui/button';
import { ConfirmDialog } from '../ui/confirm-dialog';
import { Menu } from '../ui/menu';
import { tell } from '../ui/toast';

interface PersonMenuProps {
  me: Me;
  placement: 'top start' | 'bottom end';
  compact?: boolean;
}

/** Who is signed in, the theme, the password, and the way out. */
export function PersonMenu({ me, placement, compact }: PersonMenuProps) {
  const { choice } = useTheme();
  const [open, setOpen] = useState<'password' | 'everywhere' | null>(null);
  const here = useSignOut('here');
  const everywhere = useSignOut('everywhere');
  const words = me.roles.map((role) => roleWords[role]);
  const signOut = () =>
    here.mutate(undefined, {
      onError: (error) => tell.failed('Not signed out', { detail: messageOf(error) }),
    });
  return (
    <>
      <Menu
        label="Your account"
        placement={placement}
        trigger={
          compact ? (
            <IconButton icon={UserRound} label={`${me.name}: account and theme`} />
          ) : (
            <Button variant="quiet" className="w-full justify-start! px-2.5! text-left! font-normal!">
              <span className="min-w-0">
                <span className="block truncate">{me.name}</span>
                <span className="line-clamp-2 text-sm leading-tight text-graphite">
                  {words.join(', ') || 'no roles yet'}
                </span>
              </span>
            </Button>
          )
        }
        head={
          <>
            <p className="font-semibold">{me.name}</p>
            <p className="text-sm wrap-anywhere text-graphite">{me.email}</p>
            <p className="text-sm text-graphite">{words.join(', ')}</p>
          </>
        }
        groups={[
          {
            id: 'theme',
            title: 'Theme',
            items: [
              { id: 'light', label: 'Light' },
              { id: 'dark', label: 'Dark' },
              { id: 'system', label: 'As the system' },
            ],
            chosen: [choice],
            onChoose: ([next]) => chooseTheme(next as ThemeChoice),
          },
          {
            id: 'account',
            title: 'Account',
            items: [
              { id: 'account', label: 'Your account', icon: User, to: '/account' },
              { id: 'password', label: 'Change password', icon: KeyRound, onAction: () => setOpen('password') },
              { id: 'out', label: 'Sign out', icon: LogOut, onAction: signOut },
              { id: 'everywhere', label: 'Sign out everywhere', icon: MonitorX, onAction: () => setOpen('everywhere') },
            ],
          },
        ]}
      />
      {open === 'password' ? <PasswordDialog onClose={() => setOpen(null)} /> : null}
      <ConfirmDialog
        title="Sign out everywhere"
        confirmLabel="Sign out everywhere"
        isOpen={open === 'everywhere'}
        onClose={() => setOpen(null)}
        onConfirm={() => everywhere.mutateAsync()}
      >
        <p>Ends your session on this and every other device. Saved drafts stay; you sign in again to go on.</p>
      </ConfirmDialog>
    </>
  );
}
