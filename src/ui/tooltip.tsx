import type { ReactElement, ReactNode } from 'react';
import { OverlayArrow, Tooltip as AriaTooltip, TooltipTrigger } from 'react-aria-components/Tooltip';

export interface TooltipProps {
  /** What the tooltip says; a sentence at most. */
  text: ReactNode;
  /** One thing that takes focus: a button or link of this kit. */
  children: ReactElement;
  delay?: number;
  isOpen?: boolean;
  onOpenChange?: (open: boolean) => void;
}

/** Words that appear on hover and on keyboard focus. Never the only place where something necessary is said. */
export function Tooltip({ text, children, delay = 500, isOpen, onOpenChange }: TooltipProps) {
  return (
    <TooltipTrigger delay={delay} closeDelay={80} isOpen={isOpen} onOpenChange={onOpenChange}>
      {children}
      <AriaTooltip
        offset={8}
        className="z-50 max-w-72 rounded border border-ink bg-ink px-2.5 py-1.5 text-sm text-paper shadow-(--lift)"
      >
        <OverlayArrow>
          <svg width={10} height={10} viewBox="0 0 8 8" className="block fill-ink" aria-hidden>
            <path d="M0 0 L4 4 L8 0" />
          </svg>
        </OverlayArrow>
        {text}
      </AriaTooltip>
    </TooltipTrigger>
  );
}
