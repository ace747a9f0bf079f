import { type ReactNode, useEffect } from 'react';

type PageProps = {
  title: string;
  lead?: ReactNode;
  actions?: ReactNode;
  children: ReactNode;
  wide?: boolean;
};

/** A page: its title, what can be done, its content. */
export function Page({ title, lead, actions, children, wide = false }: PageProps) {
  useEffect(() => {
    document.title = `${title} · Toeboard`;
  }, [title]);
  return (
    <div className={`mx-auto w-full px-4 py-5 sm:px-6 ${wide ? 'max-w-[1400px]' : 'max-w-5xl'}`}>
      <div className="mb-4 flex flex-wrap items-start justify-between gap-3">
        <div className="min-w-0">
          <h1 className="text-2xl">{title}</h1>
          {lead ? <div className="mt-1 text-ink-soft">{lead}</div> : null}
        </div>
        {actions ? <div className="no-print flex flex-wrap gap-2">{actions}</div> : null}
      </div>
      {children}
    </div>
  );
}

/** A section begins with the lip, not with a box. */
export function Section({
  title,
  actions,
  children,
}: {
  title: string;
  actions?: ReactNode;
  children: ReactNode;
}) {
  return (
    <section className="lip mt-8">
      <div className="mb-3 flex flex-wrap items-center justify-between gap-2">
        <h2 className="text-lg">{title}</h2>
        {actions ? <div className="no-print flex flex-wrap gap-2">{actions}</div> : null}
      </div>
      {children}
    </section>
  );
}
