import { useState } from 'react';
import type { z } from 'zod';
import { newId } from '#shared/kernel/ids.ts';
import { enrol, type enrolBody } from '#shared/signons/signons.api.ts';
import { call } from '../lib/call.ts';
import { ChooseScreen } from './ChooseScreen.tsx';
import { FindScreen, type Found } from './FindScreen.tsx';
import { NewPersonScreen } from './NewPersonScreen.tsx';
import { NoticeScreen } from './NoticeScreen.tsx';
import { useSending } from './useSending.ts';

type Step = 'notice' | 'find' | 'choose' | 'new';

/** Notice, find yourself with the day code, or add yourself; afterwards this phone is known. */
export function EnrolFlow({
  token,
  notice,
  onEnrolled,
}: {
  token: string;
  notice: { version: number; paragraphs: string[] };
  onEnrolled: (personId: string) => void;
}) {
  const [step, setStep] = useState<Step>('notice');
  const [found, setFound] = useState<Found | null>(null);
  // One id for all tries of this enrolment, so that a resend ties the phone once.
  const [deviceId] = useState(newId);
  const { busy, trouble, send } = useSending();
  const enrolAs = (dayCode: string, person: z.input<typeof enrolBody>['person']) =>
    send(async () => {
      const body = { dayCode, deviceId, noticeVersion: notice.version, person };
      const { personId } = await call(enrol, { params: { token }, body });
      onEnrolled(personId);
    });
  if (step === 'notice')
    return <NoticeScreen paragraphs={notice.paragraphs} onAgree={() => setStep('find')} />;
  if (step === 'find' || !found)
    return (
      <FindScreen
        token={token}
        start={found ?? { name: '', dayCode: '' }}
        onFound={(answer) => {
          setFound(answer);
          setStep('choose');
        }}
      />
    );
  if (step === 'choose')
    return (
      <ChooseScreen
        found={found}
        busy={busy}
        trouble={trouble?.message ?? null}
        onChoose={(existing) => enrolAs(found.dayCode, { existing })}
        onNew={() => setStep('new')}
        onBack={() => setStep('find')}
      />
    );
  return (
    <NewPersonScreen
      found={found}
      busy={busy}
      trouble={trouble}
      onEnrol={(person) => enrolAs(found.dayCode, { new: person })}
      onBack={() => setStep('choose')}
    />
  );
}
