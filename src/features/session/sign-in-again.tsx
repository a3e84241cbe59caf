import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useRevalidator } from 'react-router-dom';
import type { Me, SessionAnswer } from '#contracts/session';
import { onSignedOut } from '../../lib/fetch-json';
import { Button } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import { sessionQuery } from './queries';
import { SignInForm } from './sign-in-form';

/** When the session has ended, asks to sign in over the page, so that nothing on it is lost. */
export function SignInAgain({ me }: { me: Me }) {
  const [ended, setEnded] = useState(false);
  const client = useQueryClient();
  const revalidator = useRevalidator();

  useEffect(() => onSignedOut(() => setEnded(true)), []);

  const onSignedIn = (answer: SessionAnswer) => {
    client.setQueryData(sessionQuery.queryKey, answer);
    setEnded(false);
    void client.invalidateQueries({ predicate: (query) => query.queryKey[0] !== 'session' });
    void revalidator.revalidate();
  };
  return (
    <Dialog
      title="Your session has ended"
      role="alertdialog"
      isOpen={ended}
      onClose={() => setEnded(false)}
      footer={
        <Button variant="quiet" onPress={() => window.location.assign('/sign-in')}>
          Leave this page and sign in as somebody else
        </Button>
      }
    >
      <p className="pb-4">
        Sign in again to go on where you were, {me.name}. What you typed on this page is kept; if you had just pressed a
        button, press it again afterwards.
      </p>
      {ended ? <SignInForm email={me.email} onSignedIn={onSignedIn} /> : null}
    </Dialog>
  );
}
