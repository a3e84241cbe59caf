import { useEffect, useState } from 'react';
import { classNames } from './class-names';

/** True once the wait is long enough to deserve a sign of life. */
export function useSlow(after = 100): boolean {
  const [slow, setSlow] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setSlow(true), after);
    return () => clearTimeout(timer);
  }, [after]);
  return slow;
}

export interface PendingProps {
  /** What is being loaded: “Loading the designs”. */
  label?: string;
  lines?: number;
  className?: string;
}

/** Grey lines in place of what is coming, shown after 100 ms so that fast answers do not flicker. */
export function Pending({ label = 'Loading', lines = 4, className }: PendingProps) {
  const slow = useSlow();
  if (!slow) return <div aria-busy className={className} />;
  return (
    <div aria-busy className={classNames('flex flex-col gap-2.5', className)}>
      <span role="status" className="sr-only">
        {label}
      </span>
      {Array.from({ length: lines }, (_, index) => (
        <span
          key={index}
          aria-hidden
          className="skeleton h-4"
          style={{ width: `${[92, 74, 83, 58][index % 4] ?? 80}%` }}
        />
      ))}
    </div>
  );
}
