import { createContext, useContext } from 'react';
import type { Profile } from '#shared/profiles/profile.ts';
import type { Matrix } from '#shared/risk/matrix.ts';

/** What the pieces inside the document need to know of the statement around them. */
export type StatementSurroundings = { profile: Profile; matrix: Matrix; people: string[] };

export const StatementContext = createContext<StatementSurroundings | null>(null);

export function useSurroundings(): StatementSurroundings {
  const surroundings = useContext(StatementContext);
  if (!surroundings) throw new Error('This piece belongs inside a statement.');
  return surroundings;
}
