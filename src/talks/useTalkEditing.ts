import { useEffect, useState } from 'react';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { type SendForm, useSendForm } from '../lib/useSendForm.ts';
import { formOf, talkForm, type TalkFormInput } from './talk-form.ts';
import { useSaveTalk } from './talks.queries.ts';

export type TalkEditing = {
  form: SendForm<TalkFormInput>;
  lockVersion: number;
  /** When it was last saved here. */
  savedAt: Date | null;
  /** What somebody else saved meanwhile; what was typed here stays in the form. */
  conflict: Talk | null;
  keepMine: () => void;
  takeTheirs: () => void;
};

/** A talk being written: its form, its lock version, and what to do when somebody else saved first. */
export function useTalkEditing({
  id,
  start,
  lockVersion: startVersion,
  onSaved,
}: {
  id: string;
  start: TalkFormInput;
  lockVersion: number;
  onSaved?: (talk: Talk) => void;
}): TalkEditing {
  const [lockVersion, setLockVersion] = useState(startVersion);
  const [conflict, setConflict] = useState<Talk | null>(null);
  const [savedAt, setSavedAt] = useState<Date | null>(null);
  const save = useSaveTalk(id);
  const form = useSendForm({
    schema: talkForm,
    start,
    send: async (body) => {
      const sent = form.getValues();
      try {
        const saved = await save.mutateAsync({ ...body, lockVersion });
        setLockVersion(saved.lockVersion);
        setConflict(null);
        setSavedAt(new Date());
        // What was typed while it was being saved stays, and stays unsaved.
        form.reset(sent, { keepValues: true });
        onSaved?.(saved);
      } catch (error) {
        if (error instanceof Refusal && error.extra.talk) setConflict(error.extra.talk as Talk);
        throw error;
      }
    },
  });
  useLeaveWarning(form.formState.isDirty);
  return {
    form,
    lockVersion,
    savedAt,
    conflict,
    keepMine() {
      if (!conflict) return;
      setLockVersion(conflict.lockVersion);
      setConflict(null);
    },
    takeTheirs() {
      if (!conflict) return;
      form.reset(formOf(conflict));
      setLockVersion(conflict.lockVersion);
      setConflict(null);
    },
  };
}

/** The browser asks before a page with unsaved words is closed. */
function useLeaveWarning(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [unsaved]);
}
