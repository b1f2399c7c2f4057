import Link from 'next/link';
import type { ButtonHTMLAttributes, ComponentProps, ReactNode } from 'react';
import { cx } from './class-names';

export type ButtonVariant = 'primary' | 'secondary' | 'quiet';
export type ButtonSize = 'md' | 'sm';

const VARIANTS: Record<ButtonVariant, string> = {
  primary: 'bg-indigo text-on-indigo hover:bg-indigo-deep',
  secondary: 'border border-line-strong bg-paper text-ink hover:bg-sunk',
  quiet: 'text-indigo hover:bg-sunk hover:text-indigo-deep',
};

const SIZES: Record<ButtonSize, string> = {
  md: 'min-h-10 px-4 text-base',
  sm: 'min-h-8 px-3 text-sm',
};

export function buttonClass(
  variant: ButtonVariant = 'secondary',
  size: ButtonSize = 'md',
  extra?: string,
): string {
  return cx(
    'inline-flex items-center justify-center gap-2 rounded font-semibold no-underline transition-colors duration-100',
    'aria-disabled:cursor-not-allowed aria-disabled:opacity-60 disabled:cursor-not-allowed disabled:opacity-60',
    VARIANTS[variant],
    SIZES[size],
    extra,
  );
}

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  variant?: ButtonVariant;
  size?: ButtonSize;
  /** While true the button keeps its place and focus, says what is going on, and ignores presses. */
  pending?: boolean;
  pendingLabel?: string;
}

export function Button({
  variant = 'secondary',
  size = 'md',
  pending = false,
  pendingLabel,
  className,
  type = 'button',
  onClick,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={pending ? 'button' : type}
      aria-disabled={pending || undefined}
      onClick={pending ? undefined : onClick}
      className={buttonClass(variant, size, className)}
    >
      {pending && pendingLabel ? pendingLabel : children}
    </button>
  );
}

export interface LinkButtonProps extends ComponentProps<typeof Link> {
  variant?: ButtonVariant;
  size?: ButtonSize;
}

export function LinkButton({ variant = 'secondary', size = 'md', className, ...rest }: LinkButtonProps) {
  return <Link {...rest} className={buttonClass(variant, size, className)} />;
}

export interface IconButtonProps extends Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'aria-label'> {
  /** Says what pressing does; there is no text beside the picture. */
  label: string;
  children: ReactNode;
}

export function IconButton({ label, className, children, type = 'button', ...rest }: IconButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-label={label}
      title={label}
      className={cx(
        'inline-flex size-8 items-center justify-center rounded text-ink-soft hover:bg-sunk hover:text-ink',
        'disabled:cursor-not-allowed disabled:opacity-60',
        className,
      )}
    >
      {children}
    </button>
  );
}
