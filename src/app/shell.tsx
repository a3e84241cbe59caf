import { Menu as MenuIcon, X } from 'lucide-react';
import { Suspense, useEffect, useRef, useState } from 'react';
import { Dialog as AriaDialog } from 'react-aria-components/Dialog';
import { Modal, ModalOverlay } from 'react-aria-components/Modal';
import { RouterProvider as AriaRouter } from 'react-aria-components';
import { Outlet, ScrollRestoration, useHref, useLocation, useNavigate, useNavigation } from 'react-router-dom';
import { useSession } from '../features/session/queries';
import { SignInAgain } from '../features/session/sign-in-again';
import { IconButton } from '../ui/button';
import { PageBody } from '../ui/page-header';
import { Pending, useSlow } from '../ui/pending';
import { Wordmark } from './mark';
import { PersonMenu } from './person-menu';
import { Rail } from './rail';
import { useSections } from './sections';

/** What stands around every screen: rail, person, and the places where screen readers are told of a new page. */
export function Component() {
  const { me } = useSession();
  const sections = useSections(me);
  const navigate = useNavigate();
  const { pathname } = useLocation();
  const main = useRef<HTMLElement>(null);
  const [drawer, setDrawer] = useState(false);
  const announced = useArrival(main);

  const [seen, setSeen] = useState(pathname);
  if (seen !== pathname) {
    setSeen(pathname);
    setDrawer(false);
  }

  return (
    <AriaRouter navigate={(to) => void navigate(to)} useHref={useHref}>
      <a
        href="#main"
        className="fixed top-2 left-2 z-50 -translate-y-20 rounded bg-copper px-4 py-2 font-semibold text-on-copper focus:translate-y-0"
      >
        Skip to the page
      </a>
      <Travelling />
      <div className="flex min-h-dvh flex-col min-[900px]:flex-row">
        <header
          data-no-print
          className="sticky top-0 hidden h-dvh w-49 shrink-0 flex-col border-r border-rule px-3 pt-4 pb-3 min-[900px]:flex"
        >
          <RailHead />
          <Rail sections={sections} />
          <div className="mt-auto border-t border-rule pt-2">
            <PersonMenu me={me} placement="top start" />
          </div>
        </header>
        <header
          data-no-print
          className="sticky top-0 z-30 flex items-center gap-2 border-b border-rule bg-paper px-2.5 py-1.5 min-[900px]:hidden"
        >
          <IconButton icon={MenuIcon} label="Open the menu" onPress={() => setDrawer(true)} />
          <Wordmark />
          <span className="ml-auto">
            <PersonMenu me={me} placement="bottom end" compact />
          </span>
        </header>
        <main id="main" ref={main} tabIndex={-1} className="min-w-0 flex-1 outline-none">
          <Suspense
            fallback={
              <PageBody>
                <Pending label="Loading the page" lines={6} />
              </PageBody>
            }
          >
            <Outlet />
          </Suspense>
        </main>
      </div>
      <ModalOverlay isOpen={drawer} onOpenChange={setDrawer} isDismissable className="fixed inset-0 z-40 bg-(--shade)">
        <Modal className="h-full w-72 max-w-[85vw] animate-[slide-in_0.16s_ease-out] border-r border-rule bg-paper">
          <AriaDialog aria-label="Menu" className="flex h-full flex-col overflow-y-auto px-3 pt-3 pb-4 outline-none">
            <div className="flex items-start justify-between">
              <RailHead />
              <IconButton icon={X} label="Close the menu" onPress={() => setDrawer(false)} />
            </div>
            <Rail sections={sections} />
          </AriaDialog>
        </Modal>
      </ModalOverlay>
      <p aria-live="polite" className="sr-only">
        {announced}
      </p>
      <SignInAgain me={me} />
      <ScrollRestoration />
    </AriaRouter>
  );
}

const RailHead = () => (
  <div className="px-2.5 pb-5">
    <Wordmark />
  </div>
);

/** After moving to another page, takes the focus to it and has its title read out. */
function useArrival(main: React.RefObject<HTMLElement | null>): string {
  const { pathname } = useLocation();
  const [announced, setAnnounced] = useState('');
  const first = useRef(true);
  useEffect(() => {
    if (first.current) {
      first.current = false;
      return;
    }
    const timer = setTimeout(() => {
      // A field of the new page may have taken the focus itself.
      if (!main.current?.contains(document.activeElement)) main.current?.focus({ preventScroll: true });
      setAnnounced(document.title.replace(' · Tremolode', ''));
    }, 80);
    return () => clearTimeout(timer);
  }, [pathname, main]);
  return announced;
}

/** A line along the top while the next page is being fetched. */
function Travelling() {
  const { state } = useNavigation();
  return state === 'idle' ? null : <TravelLine />;
}

function TravelLine() {
  const slow = useSlow();
  if (!slow) return null;
  return (
    <div
      role="progressbar"
      aria-label="Loading the next page"
      className="fixed inset-x-0 top-0 z-50 h-0.5 overflow-hidden bg-rule"
    >
      <div className="h-full w-1/3 animate-[travel_1.1s_ease-in-out_infinite] bg-copper" />
    </div>
  );
}
