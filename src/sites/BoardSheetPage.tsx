import { useQuery } from '@tanstack/react-query';
import { Printer } from 'lucide-react';
import { useParams } from 'react-router-dom';
import { formatDay } from '#shared/kernel/work-date.ts';
import { paths } from '../app/paths.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { signAccessQuery, siteQuery } from './sites.queries.ts';

/** The sheet that hangs on the site board: what to scan, what to type, today's code. */
export function BoardSheetPage() {
  const { id = '' } = useParams();
  const site = useQuery(siteQuery(id));
  const access = useQuery(signAccessQuery(id));
  return (
    <Loaded query={site}>
      {({ name, address: place }) => (
        <Loaded query={access}>
          {({ address, qrSvg, dayCode, day }) => (
            <main className="mx-auto max-w-2xl bg-white p-8 text-center text-black">
              <title>{`Site board sheet, ${name}`}</title>
              <div className="no-print mb-6 flex justify-center gap-2">
                <Button kind="filled" icon={Printer} onClick={() => window.print()}>
                  Print
                </Button>
                <ButtonLink to={paths.site(id)}>Back to the site</ButtonLink>
              </div>
              <p className="text-xl">{place}</p>
              <h1 className="text-4xl">{name}</h1>
              <p className="mt-8 text-3xl font-semibold">Read it. Sign it. Then start.</p>
              <img
                alt={`QR code of ${address}`}
                src={`data:image/svg+xml;utf8,${encodeURIComponent(qrSvg)}`}
                className="mx-auto mt-6 w-80"
              />
              <p className="mt-4 break-all">{address}</p>
              <p className="mt-8 text-xl">Code for {formatDay(day)}</p>
              <p className="text-6xl font-semibold tracking-[0.2em]">{dayCode}</p>
            </main>
          )}
        </Loaded>
      )}
    </Loaded>
  );
}
