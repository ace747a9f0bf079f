import { type ButtonHTMLAttributes, type ReactNode, useEffect, useRef } from 'react';

const kinds = {
  main: 'border-transparent bg-chalk text-on-chalk font-semibold',
  quiet: 'border-edge bg-sheet text-ink aria-pressed:border-chalk aria-pressed:bg-chalk-wash',
  stop: 'border-oxide bg-sheet text-oxide font-semibold',
};

/** A button for a thumb in a glove: 48 px at least. */
export function BigButton({
  kind = 'main',
  className = '',
  ...rest
}: ButtonHTMLAttributes<HTMLButtonElement> & { kind?: keyof typeof kinds }) {
  return (
    <button
      type="button"
      className={`inline-flex min-h-12 min-w-12 items-center justify-center gap-2 rounded-[3px] border px-4 py-2 text-center disabled:cursor-not-allowed disabled:opacity-60 ${kinds[kind]} ${className}`}
      {...rest}
    />
  );
}

/** One screen of the flow: its heading takes the focus, so that a screen reader and a keyboard begin at the top. */
export function Screen({
  title,
  above,
  children,
  actions,
  language,
}: {
  title: string;
  above?: ReactNode;
  children: ReactNode;
  actions?: ReactNode;
  language?: string;
}) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    heading.current?.focus({ preventScroll: true });
    const frame = heading.current?.closest('[data-scroll-frame]');
    if (frame) frame.scrollTop = 0;
    else window.scrollTo(0, 0);
  }, [title]);
  return (
    <div className="flex min-h-full grow flex-col" lang={language}>
      <div className="mx-auto w-full max-w-[42rem] grow px-4 pb-6 pt-3">
        {above}
        <h1 ref={heading} tabIndex={-1} className="mb-3 text-xl font-semibold leading-tight outline-none">
          {title}
        </h1>
        {children}
      </div>
      {actions && (
        <div className="sticky bottom-0 z-10 border-t-[3px] border-zinc bg-paper pb-[env(safe-area-inset-bottom)]">
          <div className="mx-auto flex w-full max-w-[42rem] gap-2 border-t border-zinc mt-[3px] px-4 py-2">
            {actions}
          </div>
        </div>
      )}
    </div>
  );
}

/** Says what is wrong, beside what it is about; empty while nothing is. */
export function Trouble({ id, words }: { id?: string; words: string | null }) {
  return (
    <p
      id={id}
      role="alert"
      className={words ? 'mt-2 border-l-4 border-line pl-3 font-semibold text-line' : ''}
    >
      {words}
    </p>
  );
}

/** Label, help and trouble around one input. */
export function Labelled({
  id,
  label,
  help,
  trouble = null,
  children,
}: {
  id: string;
  label: string;
  help?: string;
  trouble?: string | null;
  children: ReactNode;
}) {
  return (
    <div className="mb-4">
      <label htmlFor={id} className="mb-1 block font-semibold">
        {label}
      </label>
      {help && (
        <p id={`${id}-help`} className="mb-1 text-ink-soft">
          {help}
        </p>
      )}
      {children}
      <Trouble id={`${id}-trouble`} words={trouble} />
    </div>
  );
}

export const inputClass =
  'block min-h-12 w-full rounded-[3px] border border-edge bg-sheet px-3 py-2 text-[1.125rem] text-ink';

/** A passage that is told by the trade's folded edge. */
export function Section({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="mt-5 border-t-[3px] border-zinc">
      <div className="mt-[3px] border-t border-zinc pt-2">
        <h2 className="mb-2 font-semibold">{title}</h2>
        {children}
      </div>
    </section>
  );
}
