import { type Ref, useEffect, useImperativeHandle, useRef, useState } from 'react';
import type { SlashItem } from './slash.ts';

export type SlashMenuHandle = { onKey: (event: KeyboardEvent) => boolean };

export type SlashMenuProps = {
  ref?: Ref<SlashMenuHandle>;
  items: SlashItem[];
  query: string;
  command: (item: SlashItem) => void;
};

/** The list that `/` opens; the keys reach it through its handle, because the focus stays in the text. */
export function SlashMenu({ ref, items, query, command }: SlashMenuProps) {
  const [at, setAt] = useState(0);
  const [asked, setAsked] = useState(query);
  const chosen = useRef<HTMLLIElement>(null);
  if (asked !== query) {
    setAsked(query);
    setAt(0);
  }
  useEffect(() => chosen.current?.scrollIntoView({ block: 'nearest' }), [at]);
  useImperativeHandle(ref, () => ({
    onKey(event) {
      if (items.length === 0) return false;
      if (event.key === 'ArrowDown') setAt((at + 1) % items.length);
      else if (event.key === 'ArrowUp') setAt((at + items.length - 1) % items.length);
      else if (event.key === 'Enter' || event.key === 'Tab') {
        const item = items[at];
        if (item) command(item);
      } else return false;
      return true;
    },
  }));
  if (items.length === 0) {
    return query === '' ? null : (
      <p className="z-50 rounded border border-zinc bg-sheet px-3 py-2 text-ink-soft shadow-float">
        Nothing of that name. Escape leaves the text.
      </p>
    );
  }
  return (
    <ul
      role="listbox"
      aria-label="Put in"
      className="z-50 max-h-72 w-80 overflow-y-auto rounded border border-zinc bg-sheet p-1 text-ink shadow-float"
    >
      {items.map((item, index) => (
        <li
          key={item.name}
          ref={index === at ? chosen : null}
          role="option"
          aria-selected={index === at}
          className={`cursor-pointer rounded px-3 py-1.5 ${index === at ? 'bg-chalk-wash' : ''}`}
          onMouseDown={(event) => {
            event.preventDefault();
            command(item);
          }}
        >
          <span className="block font-medium">{item.name}</span>
          <span className="block text-sm text-ink-soft">{item.hint}</span>
        </li>
      ))}
    </ul>
  );
}
