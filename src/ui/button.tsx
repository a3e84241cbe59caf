import type { LucideIcon } from 'lucide-react';
import type { ReactNode, Ref } from 'react';
import { Button as AriaButton } from 'react-aria-components/Button';
import { Link } from 'react-router-dom';
import type { LinkProps } from 'react-router-dom';
import { classNames } from './class-names';
import { Tooltip } from './tooltip';

export type ButtonVariant = 'primary' | 'secondary' | 'quiet' | 'danger';
export type ButtonSize = 'medium' | 'small';

const variants: Record<ButtonVariant, string> = {
  primary: 'border-copper bg-copper text-on-copper hover:border-(--copper-deep) hover:bg-(--copper-deep) font-semibold',
  secondary: 'border-(--edge) bg-sheet text-ink hover:border-ink font-medium',
  quiet: 'border-transparent text-ink hover:bg-wash font-medium',
  danger:
    'border-cinnabar text-cinnabar bg-sheet hover:bg-cinnabar hover:text-(--on-cinnabar) data-[pressed]:bg-cinnabar data-[pressed]:text-(--on-cinnabar) font-semibold',
};
const notPossible = 'border-dashed border-(--edge) bg-transparent text-graphite font-medium cursor-not-allowed';
const sizes: Record<ButtonSize, string> = {
  medium: 'min-h-9.5 px-3.5 gap-2 rounded-[5px]',
  small: 'min-h-8 px-2.5 gap-1.5 rounded text-sm',
};

export function buttonClass(variant: ButtonVariant, size: ButtonSize, possible = true): string {
  return classNames(
    'inline-flex shrink-0 items-center justify-center border text-center leading-tight transition-colors select-none',
    'data-[pressed]:translate-y-px no-underline',
    sizes[size],
    possible ? variants[variant] : notPossible,
  );
}

interface LookProps {
  variant?: ButtonVariant;
  size?: ButtonSize;
  icon?: LucideIcon;
  children: ReactNode;
}

export interface ButtonProps extends LookProps {
  onPress?: () => void;
  type?: 'button' | 'submit' | 'reset';
  /** The work that it started is under way: it keeps focus and takes no second press. */
  pending?: boolean;
  /** For trivially visible reasons only; otherwise use ActionButton and say why. */
  disabled?: boolean;
  autoFocus?: boolean;
  form?: string;
  slot?: string;
  className?: string;
  'aria-label'?: string;
  'aria-describedby'?: string;
  'aria-expanded'?: boolean;
  'aria-pressed'?: boolean;
  'aria-disabled'?: boolean;
  ref?: Ref<HTMLButtonElement>;
}

const Turning = () => (
  <span
    aria-hidden
    className="size-[1em] animate-[turn_0.8s_linear_infinite] rounded-full border-2 border-current border-r-transparent"
  />
);

export function Button({
  variant = 'secondary',
  size = 'medium',
  icon: Icon,
  pending = false,
  disabled = false,
  className,
  children,
  ...rest
}: ButtonProps) {
  const possible = !disabled && rest['aria-disabled'] !== true;
  return (
    <AriaButton
      {...rest}
      isPending={pending}
      isDisabled={disabled}
      className={classNames(buttonClass(variant, size, possible), className)}
    >
      {pending ? <Turning /> : Icon ? <Icon aria-hidden className="size-[1.15em] shrink-0" strokeWidth={1.9} /> : null}
      {children}
    </AriaButton>
  );
}

export interface ButtonLinkProps extends LookProps {
  to: LinkProps['to'];
  className?: string;
  /** Name of the file where the link downloads one; leaves the router alone. */
  download?: string;
}

/** A link that looks like a button because it is the action of the page. */
export function ButtonLink({
  variant = 'secondary',
  size = 'medium',
  icon: Icon,
  to,
  className,
  children,
  download,
}: ButtonLinkProps) {
  return (
    <Link
      to={to}
      className={classNames(buttonClass(variant, size), className)}
      {...(download === undefined ? {} : { download, reloadDocument: true })}
    >
      {Icon ? <Icon aria-hidden className="size-[1.15em] shrink-0" strokeWidth={1.9} /> : null}
      {children}
    </Link>
  );
}

export interface IconButtonProps extends Omit<ButtonProps, 'children' | 'icon' | 'aria-label'> {
  icon: LucideIcon;
  /** What it does, as a verb; read out and shown as tooltip. */
  label: string;
}

/** A button with an icon only; the tooltip says what it does. */
export function IconButton({
  icon: Icon,
  label,
  variant = 'quiet',
  size = 'medium',
  className,
  ...rest
}: IconButtonProps) {
  return (
    <Tooltip text={label}>
      <Button
        {...rest}
        variant={variant}
        size={size}
        aria-label={label}
        className={classNames(size === 'small' ? 'w-8 px-0!' : 'w-9.5 px-0!', className)}
      >
        <Icon aria-hidden className="size-[1.2em]" strokeWidth={1.9} />
      </Button>
    </Tooltip>
  );
}
