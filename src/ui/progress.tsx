import type { ReactNode } from 'react';
import { Button } from './button';
import { classNames } from './class-names';

export interface ProgressProps {
  label: string;
  /** 0 to 1; null while it cannot be told. */
  fraction: number | null;
  /** Words about the time left or the count done. */
  detail?: ReactNode;
  onCancel?: () => void;
}

/** Long work: how far, how long still, and a way out. */
export function Progress({ label, fraction, detail, onCancel }: ProgressProps) {
  const percent = fraction === null ? null : Math.round(Math.min(1, Math.max(0, fraction)) * 100);
  return (
    <div className="flex flex-col gap-1.5">
      <div className="flex items-baseline justify-between gap-4">
        <span className="font-medium">{label}</span>
        <span className="text-sm text-graphite">
          {detail} {percent === null ? null : <span className="font-mono">{percent} %</span>}
        </span>
      </div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent ?? undefined}
        className="h-1.5 overflow-hidden rounded-full bg-wash"
      >
        <div
          className={classNames('h-full bg-copper', percent === null && 'animate-[breathe_1.6s_ease-in-out_infinite]')}
          style={{ width: `${percent ?? 100}%` }}
        />
      </div>
      {onCancel ? (
        <Button size="small" onPress={onCancel} className="self-start">
          Cancel
        </Button>
      ) : null}
    </div>
  );
}
