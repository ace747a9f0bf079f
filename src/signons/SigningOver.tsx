import { useQueryClient } from '@tanstack/react-query';
import { Dialog } from 'radix-ui';
import { PersonFlow } from '../sign/PersonFlow.tsx';
import { useAccountSignApi } from './useAccountSignApi.ts';

export type Signer = { personId: string; name: string; start: { only: string } | 'first' };

/** The signing of one person over the whole screen of a signed-in device, with nothing of the application in reach. */
export function SigningOver({
  signer,
  siteId,
  finishLabel,
  onClose,
}: {
  signer: Signer | null;
  siteId: string;
  finishLabel: string;
  onClose: () => void;
}) {
  const client = useQueryClient();
  const close = () => {
    // What was signed shows in all of these.
    for (const key of ['register', 'sites', 'talks', 'board', 'today', 'to-sign', 'exceptions', 'statements'])
      void client.invalidateQueries({ queryKey: [key] });
    onClose();
  };
  return (
    <Dialog.Root open={signer !== null} onOpenChange={(open) => !open && close()}>
      <Dialog.Portal>
        <Dialog.Content
          data-scroll-frame
          aria-describedby={undefined}
          onOpenAutoFocus={(event) => event.preventDefault()}
          onInteractOutside={(event) => event.preventDefault()}
          className="fixed inset-0 z-40 flex flex-col overflow-y-auto bg-paper text-ink"
        >
          <Dialog.Title className="sr-only">{signer?.name ?? ''} signs</Dialog.Title>
          {signer && (
            <Over
              key={signer.personId}
              signer={signer}
              siteId={siteId}
              finishLabel={finishLabel}
              onClose={close}
            />
          )}
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  );
}

function Over({
  signer,
  siteId,
  finishLabel,
  onClose,
}: {
  signer: Signer;
  siteId: string;
  finishLabel: string;
  onClose: () => void;
}) {
  const api = useAccountSignApi({ siteId, personId: signer.personId });
  return (
    <PersonFlow
      api={api}
      start={signer.start}
      finish={{ label: finishLabel, onFinish: onClose }}
      onLeave={onClose}
    />
  );
}
