import { useQuery } from '@tanstack/react-query';
import { Menu } from 'lucide-react';
import { useState } from 'react';
import { Link, Navigate, NavLink, Outlet, useLocation } from 'react-router-dom';
import type { Role } from '#shared/kernel/roles.ts';
import { Loaded } from '../ui/Loaded.tsx';
import { Mark } from '../ui/Mark.tsx';
import { SendKept } from '../signons/SendKept.tsx';
import { Toaster } from '../ui/Toaster.tsx';
import { AccountMenu } from './AccountMenu.tsx';
import { Board } from './Board.tsx';
import { CommandList } from './CommandList.tsx';
import { paths } from './paths.ts';
import { placesOf } from './places.ts';
import { sessionQuery } from './session.queries.ts';
import { SignInAgain } from './SignInAgain.tsx';
import { SiteChooser } from './SiteChooser.tsx';

/** The frame of every signed-in page. */
export function Shell() {
  const session = useQuery(sessionQuery);
  const { pathname, search } = useLocation();
  if (session.data === null)
    return <Navigate to={`${paths.signIn}?to=${encodeURIComponent(pathname + search)}`} replace />;
  return (
    <Loaded query={session}>
      {(data) =>
        data ? (
          <div className="flex min-h-dvh flex-col">
            <a
              href="#content"
              className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-sheet focus:p-2"
            >
              Skip to the page
            </a>
            <Header
              role={data.role}
              invented={data.organisation.invented}
              organisation={data.organisation.name}
            />
            <main id="content" tabIndex={-1} className="grow pb-4 outline-none">
              <Outlet />
            </main>
            <div className="no-print sticky bottom-0 z-30">
              <Board />
              <TabBar role={data.role} />
            </div>
            <SignInAgain />
            <SendKept />
            <CommandList />
            <Toaster />
          </div>
        ) : null
      }
    </Loaded>
  );
}

function Header({ role, organisation, invented }: { role: Role; organisation: string; invented: boolean }) {
  return (
    <header className="no-print border-b border-zinc bg-sheet">
      <div className="flex items-center gap-x-5 px-4 py-2 sm:px-6">
        <Link to={paths.home} className="flex items-center gap-2 font-semibold text-ink no-underline">
          <Mark />
          Toeboard
        </Link>
        <nav aria-label="Main" className="hidden grow gap-1 md:flex">
          {placesOf(role).map((place) => (
            <NavLink
              key={place.to}
              to={place.to}
              className={({ isActive }) =>
                `rounded px-2.5 py-1.5 no-underline ${isActive ? 'bg-chalk-wash font-medium text-chalk' : 'text-ink hover:bg-chalk-wash'}`
              }
            >
              {place.name}
            </NavLink>
          ))}
        </nav>
        <div className="ml-auto flex min-w-0 items-center gap-2">
          <SiteChooser />
          <AccountMenu />
        </div>
      </div>
      {invented ? (
        <p className="border-t border-zinc px-4 py-0.5 text-sm text-ink-soft sm:px-6">
          {organisation}: invented demo data, every name and number in it
        </p>
      ) : null}
    </header>
  );
}

/** On a phone the places stand in thumb's reach; what does not fit is behind "More". */
function TabBar({ role }: { role: Role }) {
  const [more, setMore] = useState(false);
  const all = placesOf(role);
  const shown = all.length > 5 ? all.slice(0, 4) : all;
  const rest = all.slice(shown.length);
  return (
    <nav aria-label="Main, on a phone" className="border-t border-zinc bg-sheet md:hidden">
      {more ? (
        <div className="flex flex-wrap gap-1 border-b border-zinc p-2">
          {rest.map((place) => (
            <NavLink
              key={place.to}
              to={place.to}
              onClick={() => setMore(false)}
              className="flex min-h-12 items-center gap-2 rounded px-3 text-ink no-underline"
            >
              <place.icon size={18} strokeWidth={1.75} aria-hidden />
              {place.name}
            </NavLink>
          ))}
        </div>
      ) : null}
      <div className="flex">
        {shown.map((place) => (
          <NavLink
            key={place.to}
            to={place.to}
            className={({ isActive }) =>
              `flex min-h-14 grow basis-0 flex-col items-center justify-center text-xs no-underline ${isActive ? 'text-chalk' : 'text-ink-soft'}`
            }
          >
            <place.icon size={20} strokeWidth={1.75} aria-hidden />
            {place.name}
          </NavLink>
        ))}
        {rest.length > 0 ? (
          <button
            type="button"
            aria-expanded={more}
            onClick={() => setMore(!more)}
            className="flex min-h-14 grow basis-0 flex-col items-center justify-center text-xs text-ink-soft"
          >
            <Menu size={20} strokeWidth={1.75} aria-hidden />
            More
          </button>
        ) : null}
      </div>
    </nav>
  );
}
