import { useSlow } from '../../ui/pending';
import { Button } from '../../ui/button';
import { Status } from '../../ui/status';
import type { Freshness } from './live-estimate';

/** Figures of an earlier state step back into the colour of secondary text; words beside them say why. */
export const previousFigures = '[&_.font-mono]:text-graphite';

interface FreshnessProps {
  freshness: Freshness;
  /** Whether any figures are on the page. */
  shown: boolean;
  /** Names of the fields that are wrong. */
  wrong: readonly { path: string; label: string }[];
  /** What stands there while nothing needs saying: how the figures were reached. */
  calm: string;
  failure?: string | undefined;
  onRetry: () => void;
}

const names = (wrong: FreshnessProps['wrong']) => wrong.slice(0, 3);

/** Says to what state of the fields the figures belong; where that is the present one, how they were reached. */
export function FreshnessWords({ freshness, shown, wrong, calm, failure, onRetry }: FreshnessProps) {
  if (freshness === 'current') return <p className="text-sm text-graphite">{calm}</p>;
  if (freshness === 'none' || freshness === 'computing') return <Computing {...{ shown, calm }} />;
  if (freshness === 'failed')
    return (
      <div className="flex flex-col items-start gap-1.5">
        <Status tone="attention">{shown ? 'previous figures' : 'no figures'}</Status>
        <p className="text-sm text-graphite">{failure ?? 'The server did not answer.'} It is tried again by itself.</p>
        <Button size="small" onPress={onRetry}>
          Compute again now
        </Button>
      </div>
    );
  return (
    <div className="flex flex-col gap-0.5">
      <Status tone="bad">{shown ? 'figures of the last valid state' : 'cannot be computed yet'}</Status>
      <p className="text-sm">
        {wrong.length === 0 ? (
          'The document cannot be computed as it stands.'
        ) : (
          <>
            {names(wrong).map(({ path, label }, index) => (
              <span key={path}>
                {index > 0 ? ', ' : ''}
                <a href={`#field-${path}`} className="link">
                  {label}
                </a>
              </span>
            ))}
            {wrong.length > 3 ? ` and ${wrong.length - 3} more` : ''} {wrong.length === 1 ? 'is' : 'are'} wrong.
          </>
        )}
      </p>
    </div>
  );
}

/** Quick answers pass without a word; only what takes a moment is said. */
function Computing({ shown, calm }: { shown: boolean; calm: string }) {
  const slow = useSlow(150);
  if (!slow) return <p className="text-sm text-graphite">{calm}</p>;
  return <p className="text-sm text-amber">{shown ? 'previous figures – computing' : 'computing'}</p>;
}

/** The same in a word or two; null where the figures are the present ones. */
export const freshnessInAWord = (freshness: Freshness): string | null =>
  ({
    current: null,
    none: 'computing',
    computing: 'computing',
    faulty: 'last valid state',
    failed: 'previous figures',
  })[freshness];
