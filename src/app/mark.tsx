import { classNames } from '../ui/class-names';

/** A swing through a coil in section. */
export function Mark({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 32" className={classNames('shrink-0', className)} fill="none" aria-hidden focusable="false">
      <path
        d="M2.500 17c2.800-11 6.700-11 9.800-0.500s6.600 11 9.600 0.200c1.500-5.400 3.800-8 7.600-8"
        className="stroke-ink"
        strokeWidth={2.4}
        strokeLinecap="round"
      />
      <rect x={9.6} y={3} width={5.4} height={5.4} className="stroke-copper" strokeWidth={2.2} />
      <rect x={9.6} y={23.6} width={5.4} height={5.4} className="stroke-copper" strokeWidth={2.2} />
    </svg>
  );
}

export function Wordmark() {
  return (
    <span className="inline-flex items-center gap-2.5">
      <Mark className="size-6.5" />
      <span className="text-xl font-bold tracking-[-0.015em]">Tremolode</span>
    </span>
  );
}
