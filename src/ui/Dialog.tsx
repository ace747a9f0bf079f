import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { Button } from './Button.tsx';

type DialogProps = {
  title: string;
  lead?: ReactNode;
  open: boolean;
  onClose: () => void;
  children?: ReactNode;
  /** A dialog that must be answered can't be clicked away. */
  firm?: boolean;
};

export function Dialog({ title, lead, open, onClose, children, firm = false }: DialogProps) {
  return (
    <Radix.Root open={open} onOpenChange={(next) => (next || firm ? undefined : onClose())}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/45" />
        <Radix.Content
          className="fixed top-1/2 left-1/2 z-50 flex max-h-[90dvh] w-[min(36rem,calc(100vw-2rem))] -translate-x-1/2 -translate-y-1/2 flex-col gap-3 overflow-y-auto rounded bg-sheet p-5 text-ink shadow-float"
          {...(lead ? {} : { 'aria-describedby': undefined })}
          {...(firm ? { onInteractOutside: (event: Event) => event.preventDefault() } : {})}
        >
          <Radix.Title className="text-xl font-semibold">{title}</Radix.Title>
          {lead ? (
            <Radix.Description asChild>
              <div className="text-ink-soft">{lead}</div>
            </Radix.Description>
          ) : null}
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

type ConfirmProps = {
  title: string;
  /** What will be lost, or what can't be undone. */
  lead: ReactNode;
  act: string;
  open: boolean;
  busy?: boolean;
  destructive?: boolean;
  onConfirm: () => void;
  onClose: () => void;
  children?: ReactNode;
};

export function ConfirmDialog({
  title,
  lead,
  act,
  open,
  busy = false,
  destructive = false,
  onConfirm,
  onClose,
  children,
}: ConfirmProps) {
  return (
    <Dialog title={title} lead={lead} open={open} onClose={onClose}>
      {children}
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Not now</Button>
        <Button kind={destructive ? 'destructive' : 'filled'} busy={busy} onClick={onConfirm}>
          {act}
        </Button>
      </div>
    </Dialog>
  );
}
