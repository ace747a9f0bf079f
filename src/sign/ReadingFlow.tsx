import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { Signature } from '#shared/signons/signature.ts';
import type { Reading } from '#shared/signons/signons.api.ts';
import { CardScreen } from './CardScreen.tsx';
import {
  type Flow,
  isAnswered,
  maySign,
  type Move,
  moveOn,
  resumeFlow,
  type Script,
  scriptOf,
} from './flow.ts';
import { QuestionScreen } from './QuestionScreen.tsx';
import type { SignedReading } from './outgoing.ts';
import { forget, forgetAll, recall, remember } from './remembered.ts';
import { SignScreen } from './SignScreen.tsx';
import { useReadingTime } from './useReadingTime.ts';

/** Cards, check questions, signature. `readOnly` shows the cards alone, for somebody who has signed. */
export function ReadingFlow({
  reading,
  person,
  changeNote,
  readOnly = false,
  witness,
  onSigned,
  onLeave,
}: {
  reading: Reading;
  person: { id: string; name: string };
  /** What changed since the person's last signature; null where there was none. */
  changeNote: string | null;
  readOnly?: boolean;
  witness?: string;
  onSigned: (signed: SignedReading) => Promise<void>;
  onLeave: () => void;
}) {
  const script = useMemo(
    () => scriptOf(readOnly ? { cards: reading.cards, questions: [] } : reading),
    [reading, readOnly],
  );
  const memory = readOnly ? null : `flow.${person.id}.${reading.hash}`;
  const [flow, move] = useFlow(script, memory);
  const { place } = flow;
  useReadingTime(place.at === 'card' ? String(place.index) : null, (ms) => move({ do: 'read', ms }));
  const goBack = useCallback(() => {
    if (place.at === 'card' && place.index === 0) onLeave();
    else move({ do: 'back' });
  }, [place, move, onLeave]);
  const lastCard = place.at === 'card' && place.index + 1 === script.cards;
  const goOn = useCallback(() => {
    if (readOnly && lastCard) onLeave();
    else move({ do: 'next' });
  }, [readOnly, lastCard, move, onLeave]);

  if (place.at === 'card')
    return (
      <CardScreen
        reading={reading}
        index={place.index}
        changeNote={changeNote}
        nextLabel={nextLabel({ script, flow, lastCard, readOnly })}
        onNext={goOn}
        onBack={goBack}
      />
    );
  const question = place.at === 'question' ? reading.questions[place.index] : undefined;
  if (place.at === 'question' && question)
    return (
      <QuestionScreen
        key={question.id}
        question={question}
        number={place.index + 1}
        of={reading.questions.length}
        tries={flow.tries[question.id] ?? []}
        language={reading.declaration.language}
        canReread={script.questions[place.index]?.card !== null}
        onAnswer={(choice) => move({ do: 'answer', choice })}
        onReread={() => move({ do: 'reread' })}
        onNext={goOn}
        onBack={goBack}
      />
    );
  const sign = async (signature: Signature) => {
    if (!maySign(script, flow)) return;
    await onSigned(signedReading(reading, flow, signature));
    if (memory) forget(memory);
  };
  return (
    <SignScreen
      title={`Sign ${reading.title}, revision ${reading.number}`}
      signer={person.name}
      declaration={reading.declaration}
      {...(witness ? { witness } : {})}
      onSign={sign}
      onBack={goBack}
    />
  );
}

/** The flow, remembered by the device after every move, so that a closed page opens where it was left. */
function useFlow(script: Script, memory: string | null): [Flow, (move: Move) => void] {
  const [flow, setFlow] = useState(() => resumeFlow(script, memory ? recall(memory) : null));
  const latest = useRef(flow);
  useEffect(() => {
    forgetAll('flow.', { keep: 40 });
  }, []);
  const move = useCallback(
    (made: Move) => {
      latest.current = moveOn(script, latest.current, made);
      if (memory) remember(memory, latest.current);
      setFlow(latest.current);
    },
    [script, memory],
  );
  return [flow, move];
}

function nextLabel({
  script,
  flow,
  lastCard,
  readOnly,
}: {
  script: Script;
  flow: Flow;
  lastCard: boolean;
  readOnly: boolean;
}): string {
  if (flow.rereading !== null) return 'Back to the question';
  if (!lastCard) return 'Next';
  if (readOnly) return 'Done';
  const open = script.questions.filter((_question, index) => !isAnswered(script, flow, index)).length;
  if (open === 0) return 'Go to sign';
  return open === 1 ? 'Answer 1 question' : `Answer ${open} questions`;
}

function signedReading(reading: Reading, flow: Flow, signature: Signature): SignedReading {
  const { id, version, language } = reading.declaration;
  return {
    revisionId: reading.revisionId,
    revisionHash: reading.hash,
    signature,
    declaration: { id, version, language },
    readingMs: flow.readingMs,
    answers: reading.questions.map((question) => ({
      question: question.id,
      tries: flow.tries[question.id] ?? [],
    })),
  };
}
