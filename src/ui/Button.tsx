import type { LucideIcon } from 'lucide-react';
import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { Link } from 'react-router-dom';

export type ButtonKind = 'filled' | 'quiet' | 'bare' | 'destructive';

const kinds: Record<ButtonKind, string> = {
  filled: 'bg-chalk text-on-chalk border-chalk hover:opacity-90',
  quiet: 'bg-sheet text-ink border-edge hover:bg-chalk-wash',
  bare: 'bg-transparent text-chalk border-transparent hover:bg-chalk-wash',
  destructive: 'bg-sheet text-oxide border-oxide hover:bg-chalk-wash',
};

const shape =
  'inline-flex items-center justify-center gap-2 rounded border px-3 min-h-10 pointer-coarse:min-h-12 font-medium no-underline disabled:opacity-60 disabled:cursor-not-allowed';

type Look = { kind?: ButtonKind; icon?: LucideIcon; children: ReactNode };

/** One filled button a screen: the one thing to do. The rest are quiet. */
export function Button({
  kind = 'quiet',
  icon: Icon,
  busy = false,
  children,
  className = '',
  ...rest
}: Look & { busy?: boolean } & ButtonHTMLAttributes<HTMLButtonElement>) {
  return (
    <button
      type="button"
      {...rest}
      disabled={rest.disabled ?? busy}
      aria-busy={busy}
      className={`${shape} ${kinds[kind]} ${className}`}
    >
      {Icon ? <Icon size={18} strokeWidth={1.75} aria-hidden /> : null}
      {children}
    </button>
  );
}

/** A link that looks like a button. `outside` opens what is not a page of the application: a file, another tab. */
export function ButtonLink({
  kind = 'quiet',
  icon: Icon,
  to,
  outside = false,
  children,
  className = '',
}: Look & { to: string; outside?: boolean; className?: string }) {
  const look = `${shape} ${kinds[kind]} ${className}`;
  const inside = (
    <>
      {Icon ? <Icon size={18} strokeWidth={1.75} aria-hidden /> : null}
      {children}
    </>
  );
  return outside ? (
    <a href={to} target="_blank" rel="noreferrer" className={look}>
      {inside}
    </a>
  ) : (
    <Link to={to} className={look}>
      {inside}
    </Link>
  );
}
