import type { ReactNode } from 'react';

export interface EmptyStateProps {
  /** What belongs here, as a sentence. */
  title: string;
  children?: ReactNode;
  /** The first step: a button or link. */
  action?: ReactNode;
}

/** A place where nothing is yet: says what belongs here and offers the first step. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-start gap-3 rounded-lg border border-dashed border-(--edge) px-6 py-8">
      <p className="text-lg font-semibold">{title}</p>
      {children ? <div className="max-w-prose text-graphite">{children}</div> : null}
      {action}
    </div>
  );
}
