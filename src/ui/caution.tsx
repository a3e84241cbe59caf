import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type CautionSeverity = 'info' | 'caution' | 'stop';

const bars: Record<CautionSeverity, string> = {
  info: 'border-graphite',
  caution: 'border-amber',
  stop: 'border-cinnabar',
};
const words: Record<CautionSeverity, string> = { info: 'Note', caution: 'Caution', stop: 'Stop' };

export interface CautionProps {
  severity?: CautionSeverity;
  /** The first words, set bold. */
  title?: string;
  children?: ReactNode;
  className?: string;
}

/** Something to know before going on: a bar at the left, words, no alarm. */
export function Caution({ severity = 'caution', title, children, className }: CautionProps) {
  return (
    <div
      role="note"
      className={classNames('border-l-[3px] bg-wash px-3.5 py-2.5 leading-snug', bars[severity], className)}
    >
      <span className="sr-only">{words[severity]}: </span>
      {title ? <strong className="font-semibold">{title} </strong> : null}
      {children}
    </div>
  );
}
