import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { BoardPart } from '#shared/sites/sites.api.ts';
import { boardQuery } from '../sites/sites.queries.ts';
import { useSiteInHand } from './site-in-hand.ts';

/**
 * The board along the bottom edge: what stands between the site's crew and the edge right now. Calm when all is well; the parts that
 * are not, and only they, stand on the string-line colour.
 */
export function Board() {
  const { siteId } = useSiteInHand();
  const { data } = useQuery({ ...boardQuery(siteId ?? ''), enabled: siteId !== null });
  if (!siteId || !data) return null;
  const worst = data.parts.find(({ well }) => !well) ?? data.parts[0];
  return (
    <aside aria-label="Board" className="border-t-[3px] border-zinc bg-sheet pt-[3px]">
      <div
        className="flex min-h-11 items-center gap-x-2 overflow-x-auto border-t border-zinc px-4 whitespace-nowrap sm:px-6"
        aria-live="polite"
      >
        <span className="shrink-0 font-medium">{data.site}</span>
        <span className="hidden gap-2 sm:flex">
          {data.parts.map((part) => (
            <Part key={part.key + part.words} part={part} />
          ))}
        </span>
        {worst ? (
          <span className="min-w-0 sm:hidden">
            <Part part={worst} />
          </span>
        ) : null}
      </div>
    </aside>
  );
}

function Part({ part: { words, well, link } }: { part: BoardPart }) {
  const look = well ? 'text-ink-soft hover:text-ink' : 'bg-line text-on-line font-medium';
  return (
    <Link to={link} className={`rounded px-2 py-0.5 no-underline hover:underline ${look}`}>
      {words}
    </Link>
  );
}
