import { chooseSite, useSiteInHand } from './site-in-hand.ts';

/** Which site is in hand: its board runs along the bottom edge. */
export function SiteChooser() {
  const { siteId, sites } = useSiteInHand();
  if (sites.length < 2 || !siteId) return null;
  return (
    <select
      aria-label="Site in hand"
      value={siteId}
      onChange={(event) => chooseSite(event.target.value)}
      className="min-h-10 min-w-0 max-w-40 truncate rounded border border-edge bg-sheet px-2 text-ink pointer-coarse:min-h-12 sm:max-w-64"
    >
      {sites.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </select>
  );
}
