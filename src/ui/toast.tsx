import { lazy, Suspense } from 'react';

interface TellOptions {
  detail?: string;
  action?: { label: string; onPress: () => void };
}

const show =
  (kind: 'success' | 'error' | 'info', duration: number) =>
  (message: string, options: TellOptions = {}): void => {
    // Fetched on the first message: nothing on a page waits for it.
    void import('sonner').then(({ toast }) =>
      toast[kind](message, {
        duration,
        description: options.detail,
        ...(options.action ? { action: { label: options.action.label, onClick: options.action.onPress } } : {}),
      }),
    );
  };

/** Short words about something done, at the edge of the page. Errors that need an answer belong where they happened. */
export const tell = {
  done: show('success', 4000),
  note: show('info', 5000),
  failed: show('error', 10_000),
};

const ToastRegion = lazy(() => import('./toast-region'));

/** Where messages appear; once, at the root. */
export const Toasts = () => (
  <Suspense fallback={null}>
    <ToastRegion />
  </Suspense>
);
