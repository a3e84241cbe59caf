import { redirect, useNavigate, useSearchParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { Wordmark } from '../app/mark';
import { sessionQuery, useSessionChange } from '../features/session/queries';
import { QuietStrip } from '../features/session/quiet-strip';
import { SignInForm } from '../features/session/sign-in-form';
import { queryClient } from '../lib/query-client';
import { useDocumentTitle } from '../ui/page-header';

/** A path of this application only: a link must not lead people elsewhere after they signed in. */
const insidePath = (next: string | null): string => (next && /^\/(?![/\\])/.test(next) ? next : '/');

export async function loader({ request }: LoaderFunctionArgs) {
  const session = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  if (session.me) throw redirect(insidePath(new URL(request.url).searchParams.get('next')));
  return null;
}

export function Component() {
  useDocumentTitle('Sign in');
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const changeSession = useSessionChange();
  return (
    <main className="grid min-h-dvh lg:grid-cols-[minmax(26rem,2fr)_3fr]">
      <div className="flex flex-col justify-between gap-10 px-6 py-8 sm:px-12 sm:py-10">
        <Wordmark />
        <div className="mx-auto w-full max-w-88 lg:mx-0">
          <h1 className="pb-1 text-2xl">Sign in</h1>
          <p className="pb-6 text-graphite">From vibration brief to released generator.</p>
          <SignInForm
            onSignedIn={(answer) => {
              changeSession(answer);
              void navigate(insidePath(search.get('next')), { replace: true });
            }}
          />
        </div>
        <p className="max-w-88 text-sm text-graphite">
          No account, or the password is lost? An administrator of your team adds people and gives a first password.
        </p>
      </div>
      <div className="hidden place-items-center border-l border-rule bg-sheet p-10 lg:grid">
        <QuietStrip className="w-full max-w-170" />
      </div>
    </main>
  );
}
