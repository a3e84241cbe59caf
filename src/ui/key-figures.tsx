import type { ReactNode } from 'react';
import { classNames } from './class-names';

export interface KeyFigure {
  label: ReactNode;
  value: ReactNode;
  /** Key where labels repeat or are not text. */
  key?: string;
}

/** Names at the left, figures at the right, one to a line. */
export function KeyFigures({
  figures,
  ruled,
  className,
}: {
  figures: readonly KeyFigure[];
  ruled?: boolean;
  className?: string;
}) {
  return (
    <dl className={classNames('grid grid-cols-[auto_1fr] gap-x-4', className)}>
      {figures.map(({ label, value, key }, index) => (
        <div
          key={key ?? (typeof label === 'string' ? label : index)}
          className={classNames(
            'col-span-2 grid grid-cols-subgrid items-baseline',
            ruled ? 'border-b border-rule py-1.5' : 'py-0.5',
          )}
        >
          <dt className="text-graphite">{label}</dt>
          <dd className="text-right">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
