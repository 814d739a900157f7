import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router';

export type ButtonVariant = 'primary' | 'secondary' | 'quiet' | 'danger';

const LOOK: Record<ButtonVariant, string> = {
  primary: 'bg-action text-on-action hover:bg-action-deep border border-transparent',
  secondary: 'bg-surface text-ink border border-edge hover:border-action hover:text-action',
  quiet: 'text-action border border-transparent hover:bg-action-soft',
  danger: 'bg-surface text-danger border border-danger hover:bg-danger-soft',
};

const SHAPE =
  'tap inline-flex items-center justify-center gap-2 rounded-lg px-4 py-2 font-semibold leading-tight text-center transition-colors disabled:opacity-60 print:hidden';

type Shared = { variant?: ButtonVariant; wide?: boolean; icon?: ReactNode };

export type ButtonProps = ButtonHTMLAttributes<HTMLButtonElement> & Shared & { pending?: boolean };

export function Button({
  variant = 'primary',
  wide,
  icon,
  pending = false,
  children,
  className = '',
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={rest.type ?? 'submit'}
      aria-busy={pending || undefined}
      className={`${SHAPE} ${LOOK[variant]} ${wide ? 'w-full' : ''} ${className}`}
    >
      {icon}
      {children}
      {pending && (
        <span
          className="size-4 animate-spin rounded-full border-2 border-current border-t-transparent"
          aria-hidden
        />
      )}
    </button>
  );
}

export type ButtonLinkProps = LinkProps & Shared;

export function ButtonLink({
  variant = 'secondary',
  wide,
  icon,
  children,
  className = '',
  ...rest
}: ButtonLinkProps) {
  return (
    <Link {...rest} className={`${SHAPE} ${LOOK[variant]} ${wide ? 'w-full' : ''} ${className}`}>
      {icon}
      {children}
    </Link>
  );
}
