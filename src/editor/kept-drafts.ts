import type { Draft } from './autosave.ts';

const nameOf = (statementId: string) => `toeboard.draft.${statementId}`;
const asideOf = (statementId: string) => `toeboard.aside.${statementId}`;

/** Keeps an unsaved draft on this device, or forgets it. A full or forbidden storage is survived: the page still has the text. */
export function keepDraft(statementId: string, draft: Draft | null): void {
  try {
    if (draft) localStorage.setItem(nameOf(statementId), JSON.stringify(draft));
    else localStorage.removeItem(nameOf(statementId));
  } catch {
    // The editor's own copy is all there is then; the state on screen says that it is not saved.
  }
}

export function keptDraft(statementId: string): Draft | null {
  try {
    return JSON.parse(localStorage.getItem(nameOf(statementId)) ?? 'null') as Draft | null;
  } catch {
    return null;
  }
}

/** The text that was not chosen in a conflict stays on this device, beside the draft. */
export function putAside(statementId: string, draft: Omit<Draft, 'lockVersion'>): void {
  try {
    localStorage.setItem(asideOf(statementId), JSON.stringify(draft));
  } catch {
    // It was offered for download before.
  }
}
