import type { Change } from '#contracts/error';
import { formatAgo } from '../../lib/format';
import { Button } from '../../ui/button';

interface StaleNoticeProps {
  changed: readonly Change[];
  message: string | undefined;
  /** Why the step is not possible any more, once the current state is known. */
  whyNot: string | null;
  onTakeOver: () => void;
}

/** Told when a step met a newer state: what changed, that nothing typed is lost, and how to go on. */
export function StaleNotice({ changed, message, whyNot, onTakeOver }: StaleNoticeProps) {
  return (
    <div role="alert" className="flex flex-col items-start gap-2 border-l-4 border-amber bg-wash px-3.5 py-2.5">
      <strong>This changed while you were looking at it, so nothing was done.</strong>
      {changed.length > 0 ? (
        <ul className="list-disc pl-5">
          {changed.map((change) => (
            <li key={`${change.version} ${change.at} ${change.what}`}>
              {change.what}{' '}
              <span className="text-graphite">
                ({change.by ?? 'the server'}, {formatAgo(change.at)})
              </span>
            </li>
          ))}
        </ul>
      ) : (
        <p>{message}</p>
      )}
      {whyNot ? <p>{whyNot} What you typed stays here to copy.</p> : <p>What you typed is kept.</p>}
      <Button size="small" onPress={onTakeOver}>
        Load the current state
      </Button>
    </div>
  );
}
