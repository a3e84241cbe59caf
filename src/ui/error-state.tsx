import { RotateCw } from 'lucide-react';
import type { ReactNode } from 'react';
import { formatAgo } from '../lib/format';
import { RequestError } from '../lib/request-error';
import { Button } from './button';

export interface ErrorStateProps {
  error?: unknown;
  /** What happened; taken from the error where it is a request's. */
  title?: string;
  /** What was kept of the person's work. */
  kept?: string;
  /** What to do now. */
  advice?: ReactNode;
  onRetry?: (() => void) | undefined;
  children?: ReactNode;
}

const titles: Partial<Record<RequestError['code'], string>> = {
  offline: 'No connection to the server',
  unavailable: 'The server is busy or being restarted',
  notFound: 'This does not exist, or not any more',
  forbidden: 'This is not open to your roles',
  tooMany: 'Too many requests in a short time',
  conflict: 'Somebody changed this in the meantime',
};

const advices: Partial<Record<RequestError['code'], string>> = {
  offline: 'Check the network, then try again.',
  unavailable: 'Try again in a moment.',
  notFound: 'Check the address, or find it from the lists in the rail.',
  forbidden: 'An administrator can change who may enter where.',
  tooMany: 'Wait a minute, then try again.',
};

/** What happened, what was kept, what to do. */
export function ErrorState({ error, title, kept, advice, onRetry, children }: ErrorStateProps) {
  const known = error instanceof RequestError ? error : null;
  return (
    <div
      role="alert"
      className="flex max-w-2xl flex-col items-start gap-2 border-l-4 border-cinnabar bg-wash px-5 py-4"
    >
      <h2>{title ?? (known && titles[known.code]) ?? 'Something went wrong'}</h2>
      {known ? (
        <p>{known.message}</p>
      ) : error === undefined ? null : (
        <p>This page could not be drawn. It is our fault, not yours.</p>
      )}
      {known && known.changed.length > 0 ? (
        <ul className="list-disc pl-5">
          {known.changed.map((change) => (
            <li key={`${change.version} ${change.at}`}>
              {change.what} ({change.by ?? 'the server'}, {formatAgo(change.at)})
            </li>
          ))}
        </ul>
      ) : null}
      {kept ? <p>{kept}</p> : null}
      <p>
        {advice ?? (known && advices[known.code]) ?? 'Try again. If it happens again, tell whoever runs the server.'}
      </p>
      {children}
      <div className="mt-1 flex flex-wrap items-center gap-3">
        {onRetry ? (
          <Button icon={RotateCw} onPress={onRetry}>
            Try again
          </Button>
        ) : null}
        {known?.requestId ? (
          <span className="text-sm text-graphite">
            Request <code>{known.requestId}</code>
          </span>
        ) : null}
      </div>
    </div>
  );
}
