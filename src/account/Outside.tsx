import type { ReactNode } from 'react';
import { Mark } from '../ui/Mark.tsx';

/** The frame of a page that nobody is signed in to. */
export function Outside({ title, children }: { title: string; children: ReactNode }) {
  return (
    <main className="mx-auto flex min-h-dvh w-full max-w-md flex-col justify-center px-4 py-10">
      <title>{`${title} · Toeboard`}</title>
      <div className="flex items-center gap-2 font-semibold">
        <Mark size={26} />
        Toeboard
      </div>
      <h1 className="mt-6 mb-4 text-2xl">{title}</h1>
      {children}
      <p className="lip mt-10 text-sm text-ink-soft">
        Toeboard helps competent people write and keep records. It does not decide that work is safe: local
        law, the designer’s and manufacturers’ instructions and licensed judgement come first.
      </p>
    </main>
  );
}
