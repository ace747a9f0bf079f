import { formatTime } from '#shared/kernel/work-date.ts';
import type { SaveState } from './autosave.ts';

/** How it stands with saving, in words. "Saved" is only ever the server's word. */
export function SaveStatus({ state, timeZone }: { state: SaveState; timeZone: string }) {
  const loud = state.kind === 'offline' || state.kind === 'refused' || state.kind === 'conflict';
  return (
    <p role="status" className={`text-sm ${loud ? 'text-line' : 'text-ink-soft'}`}>
      {wordsOfState(state, timeZone)}
    </p>
  );
}

function wordsOfState(state: SaveState, timeZone: string): string {
  if (state.kind === 'saved') return state.at ? `Saved ${formatTime(state.at, timeZone)}` : 'Saved';
  if (state.kind === 'unsaved') return 'Not saved yet';
  if (state.kind === 'saving') return 'Saving…';
  if (state.kind === 'offline') return 'No connection: kept on this device, will be saved';
  if (state.kind === 'conflict') return 'Somebody else saved meanwhile';
  return `Not saved: ${state.words}`;
}
