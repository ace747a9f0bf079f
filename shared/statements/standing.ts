/** A revision, as far as the standing of signatures depends on it. */
export type RevisionMark = { number: number; material: boolean };

/**
 * Whether a signature under revision `signed` still counts while `current` is in force: it does when no material revision came after
 * it. The first revision is material whatever it says. Nothing counts where no revision is in force.
 */
export function countsAsCurrent(signed: number, revisions: RevisionMark[], current: number | null): boolean {
  if (current === null || signed > current) return false;
  return revisions.every(({ number, material }) => number <= signed || number > current || !material);
}
