import { CloudOff } from 'lucide-react';
import { useEffect, useState } from 'react';
import { formatAgo } from '../../lib/format';
import { Button } from '../../ui/button';
import type { SaveState } from './draft-saver';

/** Runs on its own so that nothing else is drawn anew every second. */
function Ago({ at }: { at: string }) {
  const [now, setNow] = useState(() => new Date());
  const young = now.getTime() - new Date(at).getTime() < 60_000;
  useEffect(() => {
    const timer = setInterval(() => setNow(new Date()), young ? 1000 : 20_000);
    return () => clearInterval(timer);
  }, [young]);
  return <>{formatAgo(at, now)}</>;
}

/** Whether what is on the page has reached the server. */
export function SaveWords({ state, onRetry }: { state: SaveState; onRetry: () => void }) {
  const quiet = 'text-graphite';
  switch (state.kind) {
    case 'saved':
      return (
        <span className={quiet}>
          saved <Ago at={state.at} />
        </span>
      );
    case 'waiting':
      return <span className={quiet}>not yet saved</span>;
    case 'saving':
      return <span className={quiet}>saving</span>;
    case 'offline':
      return (
        <span role="status" className="inline-flex flex-wrap items-center gap-x-2 text-amber">
          <CloudOff aria-hidden className="size-[1.1em]" /> offline, kept here
          <Button size="small" variant="quiet" onPress={onRetry}>
            Save now
          </Button>
        </span>
      );
    case 'conflict':
      return (
        <span role="status" className="text-cinnabar">
          × not saved: two drafts
        </span>
      );
    case 'refused':
      return (
        <span role="status" className="text-cinnabar">
          × not saved, kept here
        </span>
      );
  }
}
