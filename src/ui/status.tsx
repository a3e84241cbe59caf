import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type Tone = 'neutral' | 'active' | 'good' | 'attention' | 'bad';

const colours: Record<Tone, string> = {
  neutral: 'text-graphite',
  active: 'text-copper',
  good: 'text-verdigris',
  attention: 'text-amber',
  bad: 'text-cinnabar',
};

/** Each tone has its own shape, so that none is told by colour alone. */
function Shape({ tone }: { tone: Tone }) {
  return (
    <svg
      viewBox="0 0 12 12"
      className="size-[0.8em] shrink-0 translate-y-[0.06em] fill-current stroke-current"
      strokeWidth={1.8}
      aria-hidden
    >
      {tone === 'neutral' ? <circle cx={6} cy={6} r={4.2} fill="none" /> : null}
      {tone === 'active' ? <circle cx={6} cy={6} r={4.6} stroke="none" /> : null}
      {tone === 'good' ? <path d="M1.5 6.500 L4.700 9.700 L10.500 2.700" fill="none" strokeWidth={2.2} /> : null}
      {tone === 'attention' ? <path d="M6 1.200 L11.200 10.600 L0.800 10.600 Z" stroke="none" /> : null}
      {tone === 'bad' ? <path d="M2 2 L10 10 M10 2 L2 10" fill="none" strokeWidth={2.4} /> : null}
    </svg>
  );
}

export interface StatusProps {
  tone: Tone;
  children: ReactNode;
  className?: string;
}

/** A state in one word, with shape and colour. */
export function Status({ tone, children, className }: StatusProps) {
  return (
    <span className={classNames('inline-flex items-baseline gap-1.5 font-semibold', colours[tone], className)}>
      <Shape tone={tone} />
      <span>{children}</span>
    </span>
  );
}

/** A small count or mark, as beside a tab or a rail entry. */
export function Count({ children, tone = 'active', label }: { children: ReactNode; tone?: Tone; label?: string }) {
  return (
    <span className={classNames('font-mono text-sm font-semibold', colours[tone])}>
      <span aria-hidden={label === undefined ? undefined : true}>{children}</span>
      {label === undefined ? null : <span className="sr-only">{label}</span>}
    </span>
  );
}
