import { useMemo, useState } from 'react';
import type { ReplyOf } from '#shared/kernel/endpoint.ts';
import { forgetDevice, getOwnReading, getOwnToSign, getSignPage } from '#shared/signons/signons.api.ts';
import { call } from '../lib/call.ts';
import { deviceOutbox, setOwner } from './device.ts';
import { EnrolFlow } from './EnrolFlow.tsx';
import { ForgetScreen } from './ForgetScreen.tsx';
import { JoinScreen } from './JoinScreen.tsx';
import { LoadScreen } from './LoadScreen.tsx';
import { UnsentNotice } from './UnsentNotice.tsx';
import { PersonFlow } from './PersonFlow.tsx';
import { BigButton } from './pieces.tsx';
import type { SignApi } from './sign-api.ts';
import { useLoad } from './useLoad.ts';
import { useKeepSending, useOutgoing } from './useOutgoing.ts';
import { useSending } from './useSending.ts';

type Opened = ReplyOf<typeof getSignPage>;

/** The light page behind a site's QR code. */
export function SignPage({ token }: { token: string }) {
  useKeepSending(deviceOutbox);
  const { value, trouble, reload } = useLoad(token, async () => {
    const opened = await call(getSignPage, { params: { token } });
    setOwner(opened.recognised?.personId ?? null);
    void deviceOutbox.flush();
    return opened;
  });
  if (!value)
    return (
      <Frame title="Site sign-on">
        <UnsentNotice outbox={deviceOutbox} />
        <LoadScreen trouble={trouble} waiting="Opening the site’s page…" onAgain={reload} />
      </Frame>
    );
  return (
    <Frame title={value.site} note={value.organisation} invented={value.invented}>
      <Opened token={token} opened={value} onChanged={reload} />
    </Frame>
  );
}

function Opened({ token, opened, onChanged }: { token: string; opened: Opened; onChanged: () => void }) {
  const { recognised, dayCodeNeeded, notice, site } = opened;
  const [leaving, setLeaving] = useState(false);
  const { busy, trouble, send } = useSending();
  const unsent = useOutgoing(deviceOutbox).filter(
    ({ state, carrier }) => state === 'waiting' && carrier.personId === recognised?.personId,
  ).length;
  if (!recognised)
    return (
      <>
        <UnsentNotice outbox={deviceOutbox} />
        <EnrolFlow
          token={token}
          notice={notice}
          onEnrolled={(personId) => {
            setOwner(personId);
            onChanged();
          }}
        />
      </>
    );
  if (leaving)
    return (
      <ForgetScreen
        name={recognised.name}
        unsent={unsent}
        busy={busy}
        trouble={trouble?.message ?? null}
        onKeep={() => setLeaving(false)}
        onForget={() =>
          send(async () => {
            await call(forgetDevice, {});
            setOwner(null);
            setLeaving(false);
            onChanged();
          })
        }
      />
    );
  const notMe = (
    <p className="mt-8 border-t border-zinc pt-4">
      You are {recognised.name}, {recognised.employer}.{' '}
      <BigButton kind="quiet" className="mt-2" onClick={() => setLeaving(true)}>
        Not me
      </BigButton>
    </p>
  );
  if (dayCodeNeeded)
    return (
      <JoinScreen
        token={token}
        site={site}
        person={recognised}
        noticeVersion={notice.version}
        footer={notMe}
        onJoined={onChanged}
      />
    );
  return <OwnFlow key={recognised.personId} token={token} personId={recognised.personId} footer={notMe} />;
}

function OwnFlow({ token, personId, footer }: { token: string; personId: string; footer: React.ReactNode }) {
  const api = useMemo<SignApi>(
    () => ({
      toSign: () => call(getOwnToSign, { params: { token } }),
      reading: (revisionId) => call(getOwnReading, { params: { token, revisionId } }),
      carrier: { kind: 'device', token, personId },
      outbox: deviceOutbox,
    }),
    [token, personId],
  );
  return (
    <PersonFlow
      api={api}
      footer={
        <>
          <UnsentNotice outbox={deviceOutbox} />
          {footer}
        </>
      }
    />
  );
}

function Frame({
  title,
  note,
  invented = false,
  children,
}: {
  title: string;
  note?: string;
  invented?: boolean;
  children: React.ReactNode;
}) {
  return (
    <div className="flex min-h-dvh flex-col bg-paper text-ink">
      <header className="border-b border-zinc">
        <div className="mb-[3px] border-b-[3px] border-zinc px-4 py-2">
          <p className="mx-auto max-w-[40rem] truncate">
            <span className="font-semibold">{title}</span>
            {note && <span className="text-ink-soft"> · {note}</span>}
          </p>
          {invented && (
            <p className="mx-auto max-w-[40rem] text-sm text-ink-soft">Demo: everything in it is invented.</p>
          )}
        </div>
      </header>
      <main className="flex grow flex-col">{children}</main>
    </div>
  );
}
