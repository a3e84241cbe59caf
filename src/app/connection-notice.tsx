import { WifiOff } from 'lucide-react';
import { useSyncExternalStore } from 'react';

function subscribe(listener: () => void): () => void {
  window.addEventListener('online', listener);
  window.addEventListener('offline', listener);
  return () => {
    window.removeEventListener('online', listener);
    window.removeEventListener('offline', listener);
  };
}

/** Tells of a lost connection for as long as it is lost. */
export function ConnectionNotice() {
  const online = useSyncExternalStore(subscribe, () => navigator.onLine);
  return (
    <div role="status" data-no-print>
      {online ? null : (
        <p className="fixed inset-x-0 bottom-0 z-50 flex items-center justify-center gap-2 border-t-2 border-amber bg-sheet px-4 py-2">
          <WifiOff aria-hidden className="size-4 text-amber" />
          No network. What you type stays on this page; nothing is sent until the connection is back.
        </p>
      )}
    </div>
  );
}
