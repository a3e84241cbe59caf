import { useId, useState } from 'react';
import { Button } from './button';
import type { ButtonProps } from './button';
import { Tooltip } from './tooltip';

export interface ActionButtonProps extends Omit<ButtonProps, 'disabled'> {
  /** Why the action is not possible now, in words; null or undefined where it is possible. */
  whyNot?: string | null | undefined;
  /** Where the reason stands: beneath the button, or in a tooltip where room is short. */
  reason?: 'beneath' | 'tooltip';
}

const nothing = () => undefined;

/**
 * The button of a thing people do. Where it is not possible it stays visible and focusable, is marked as disabled, and
 * says why: nobody has to guess why a button is missing.
 */
export function ActionButton({ whyNot, reason = 'beneath', onPress, className, type, ...rest }: ActionButtonProps) {
  const reasonId = useId();
  const [open, setOpen] = useState(false);
  if (!whyNot) return <Button {...rest} type={type} onPress={onPress} className={className} />;
  const button = (
    <Button
      {...rest}
      type="button"
      aria-disabled
      aria-describedby={reasonId}
      onPress={reason === 'tooltip' ? () => setOpen(true) : nothing}
      className={className}
    />
  );
  if (reason === 'tooltip')
    return (
      <>
        <Tooltip text={whyNot} delay={150} isOpen={open} onOpenChange={setOpen}>
          {button}
        </Tooltip>
        <span id={reasonId} hidden>
          {whyNot}
        </span>
      </>
    );
  return (
    <div className="inline-flex max-w-72 flex-col items-start gap-1">
      {button}
      <span id={reasonId} className="text-sm leading-snug text-graphite">
        {whyNot}
      </span>
    </div>
  );
}
