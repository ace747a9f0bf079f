import { useQuery } from '@tanstack/react-query';
import { Users } from 'lucide-react';
import type { Talk } from '#shared/talks/talks.api.ts';
import { paths } from '../app/paths.ts';
import { signAccessQuery } from '../sites/sites.queries.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { Loaded } from '../ui/Loaded.tsx';

/** How the crew signs an open talk: on this device handed round, or each on their own phone. */
export function SignTalk({ talk }: { talk: Talk }) {
  return (
    <div className="mt-4 flex flex-wrap items-start gap-4">
      <ButtonLink icon={Users} to={`${paths.handedRound(talk.siteId)}?talk=${talk.id}`}>
        Hand the device round
      </ButtonLink>
      <details className="rounded border border-edge bg-sheet px-4 py-2">
        <summary className="min-h-6">Let them sign on their own phones</summary>
        <OwnPhones siteId={talk.siteId} />
      </details>
    </div>
  );
}

function OwnPhones({ siteId }: { siteId: string }) {
  const query = useQuery(signAccessQuery(siteId));
  return (
    <Loaded query={query}>
      {({ address, qrSvg, dayCode }) => (
        <div className="mt-3 flex flex-wrap items-center gap-4">
          <img
            alt={`QR code of ${address}`}
            src={`data:image/svg+xml,${encodeURIComponent(qrSvg)}`}
            className="size-40 bg-[#ffffff] p-1"
          />
          <div>
            <p className="break-all">
              <a href={address}>{address}</a>
            </p>
            <p className="mt-2 text-ink-soft">Day code, for phones that are not known yet</p>
            <p className="text-3xl font-semibold tracking-[0.2em] tabular-nums">{dayCode}</p>
          </div>
        </div>
      )}
    </Loaded>
  );
}
