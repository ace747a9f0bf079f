import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { peopleQuery } from '../people/people.queries.ts';
import { statementsQuery } from '../statements/statements.queries.ts';
import { Dialog } from '../ui/Dialog.tsx';
import { inputLook } from '../ui/Field.tsx';
import { paths } from './paths.ts';
import { useMayDo, useSession } from './session.queries.ts';
import { placesOf } from './places.ts';
import { useSiteInHand } from './site-in-hand.ts';

type Command = { name: string; kind: string; to: string };

/** Ctrl or Cmd with K: everything by its name, nothing more than three steps away. */
export function CommandList() {
  const [open, setOpen] = useState(false);
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      if (event.key.toLowerCase() !== 'k' || !(event.ctrlKey || event.metaKey)) return;
      event.preventDefault();
      setOpen(true);
    };
    window.addEventListener('keydown', listen);
    return () => window.removeEventListener('keydown', listen);
  }, []);
  return (
    <Dialog title="Go to" open={open} onClose={() => setOpen(false)}>
      {open ? <Commands onDone={() => setOpen(false)} /> : null}
    </Dialog>
  );
}

function useCommands(): Command[] {
  const { role } = useSession();
  const mayDo = useMayDo();
  const { sites } = useSiteInHand();
  const statements = useQuery({ ...statementsQuery({}), enabled: mayDo('statement.read') });
  const people = useQuery({ ...peopleQuery({}), enabled: mayDo('person.read') });
  return [
    ...placesOf(role).map(({ name, to }) => ({ name, kind: 'Page', to })),
    ...(mayDo('statement.write') ? [{ name: 'New statement', kind: 'Do', to: paths.newStatement }] : []),
    ...(mayDo('talk.write') ? [{ name: 'New talk', kind: 'Do', to: paths.newTalk }] : []),
    ...(statements.data?.statements ?? []).map(({ id, title }) => ({
      name: title,
      kind: 'Statement',
      to: paths.statement(id),
    })),
    ...(people.data?.people ?? []).map(({ id, name }) => ({ name, kind: 'Person', to: paths.person(id) })),
    ...sites.map(({ id, name }) => ({ name, kind: 'Site', to: paths.site(id) })),
  ];
}

const most = 12;

function Commands({ onDone }: { onDone: () => void }) {
  const commands = useCommands();
  const navigate = useNavigate();
  const [search, setSearch] = useState('');
  const [at, setAt] = useState(0);
  const words = search.toLowerCase().split(/\s+/);
  const found = commands
    .filter(({ name, kind }) => words.every((word) => `${name} ${kind}`.toLowerCase().includes(word)))
    .slice(0, most);
  const go = (command: Command | undefined) => {
    if (!command) return;
    onDone();
    void navigate(command.to);
  };
  return (
    <>
      <input
        role="combobox"
        aria-expanded
        aria-controls="commands"
        aria-activedescendant={found[at] ? `command-${at}` : undefined}
        aria-label="Statement, person, site or page"
        className={inputLook}
        value={search}
        onChange={(event) => {
          setSearch(event.target.value);
          setAt(0);
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown') setAt(Math.min(at + 1, found.length - 1));
          if (event.key === 'ArrowUp') setAt(Math.max(at - 1, 0));
          if (event.key === 'Enter') go(found[at]);
        }}
      />
      <ul id="commands" role="listbox" aria-label="Found">
        {found.map((command, index) => (
          <li
            key={command.to + command.name}
            id={`command-${index}`}
            role="option"
            aria-selected={index === at}
            className={`flex min-h-10 cursor-pointer items-center justify-between rounded px-3 ${index === at ? 'bg-chalk-wash' : ''}`}
            onClick={() => go(command)}
          >
            <span>{command.name}</span>
            <span className="text-sm text-ink-soft">{command.kind}</span>
          </li>
        ))}
      </ul>
      {found.length === 0 ? <p className="text-ink-soft">Nothing of that name.</p> : null}
    </>
  );
}
