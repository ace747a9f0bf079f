import { useCallback, useEffect, useRef, useState } from 'react';
import { type Statement, saveDraft } from '#shared/statements/statements.api.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { call } from '../lib/call.ts';
import { type Autosave, createAutosave, type SaveState } from './autosave.ts';
import { keepDraft } from './kept-drafts.ts';

/** The autosave of one statement's draft; it lives as long as its page. */
export function useAutosave({
  id,
  lockVersion,
  updatedAt,
}: Pick<Statement, 'id' | 'lockVersion' | 'updatedAt'>) {
  const [state, setState] = useState<SaveState>({ kind: 'saved', at: updatedAt });
  const autosave = useRef<Autosave | null>(null);
  useEffect(() => {
    const made = createAutosave({
      send: (body) => call(saveDraft, { params: { id }, body }),
      keep: (draft) => keepDraft(id, draft),
      onState: setState,
      lockVersion,
      savedAt: updatedAt,
    });
    autosave.current = made;
    const online = () => void made.flush();
    const leaving = (event: BeforeUnloadEvent) => {
      if (made.hasUnsaved()) event.preventDefault();
    };
    window.addEventListener('online', online);
    window.addEventListener('beforeunload', leaving);
    return () => {
      window.removeEventListener('online', online);
      window.removeEventListener('beforeunload', leaving);
      void made.flush();
      made.stop();
    };
    // The version it starts from is the one that the page was opened with; afterwards the autosave keeps its own.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [id]);
  const change = useCallback(
    (draft: { title: string; document: NodeJson }) => autosave.current?.change(draft),
    [],
  );
  return { state, change, autosave };
}
