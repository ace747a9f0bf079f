import type { Reading } from '#shared/signons/signons.api.ts';
import { BigButton, Screen } from './pieces.tsx';

/** A check question. A wrong answer is explained and the question asked again; every try is kept. */
export function QuestionScreen({
  question,
  number,
  of,
  tries,
  language,
  canReread,
  onAnswer,
  onReread,
  onNext,
  onBack,
}: {
  question: Reading['questions'][number];
  number: number;
  of: number;
  tries: number[];
  language: string;
  canReread: boolean;
  onAnswer: (choice: number) => void;
  onReread: () => void;
  onNext: () => void;
  onBack: () => void;
}) {
  const last = tries.at(-1);
  const right = last === question.right;
  return (
    <div className="flex grow flex-col text-[1.125rem]">
      <Screen
        title={question.ask}
        language={language}
        above={
          <p className="mb-2 text-base text-ink-soft">
            Question {number} of {of}
          </p>
        }
        actions={
          <>
            <BigButton kind="quiet" className="w-1/3" onClick={onBack}>
              Back
            </BigButton>
            <BigButton className="grow" disabled={!right} onClick={onNext}>
              Next
            </BigButton>
          </>
        }
      >
        <div role="group" aria-label="Answers" className="space-y-2">
          {question.answers.map((answer, choice) => (
            <Answer
              key={answer}
              words={answer}
              mark={choice !== last ? null : right ? 'right' : 'wrong'}
              disabled={right}
              onChoose={() => onAnswer(choice)}
            />
          ))}
        </div>
        <div role="status" className="mt-4">
          {last !== undefined && (
            <div className={`border-l-8 bg-sheet py-3 pl-3 pr-2 ${right ? 'border-lichen' : 'border-line'}`}>
              <p className={`font-semibold ${right ? 'text-lichen' : 'text-line'}`}>
                {right ? 'Right.' : 'Not that one. Choose again.'}
              </p>
              <p className="mt-1">{question.why}</p>
            </div>
          )}
        </div>
        {last !== undefined && !right && canReread && (
          <BigButton kind="quiet" className="mt-3" onClick={onReread}>
            Read that card again
          </BigButton>
        )}
      </Screen>
    </div>
  );
}

function Answer({
  words,
  mark,
  disabled,
  onChoose,
}: {
  words: string;
  mark: 'right' | 'wrong' | null;
  disabled: boolean;
  onChoose: () => void;
}) {
  const edge = mark === 'right' ? 'border-lichen' : mark === 'wrong' ? 'border-line' : 'border-edge';
  return (
    <button
      type="button"
      aria-pressed={mark !== null}
      aria-disabled={disabled}
      onClick={() => !disabled && onChoose()}
      className={`block min-h-14 w-full rounded-[3px] border-2 bg-sheet px-4 py-3 text-left text-ink ${edge} ${disabled && mark === null ? 'text-ink-soft' : ''}`}
    >
      {words}
      {mark && (
        <span className={`block text-base font-semibold ${mark === 'right' ? 'text-lichen' : 'text-line'}`}>
          {mark === 'right' ? 'Your answer, right' : 'Your answer, not right'}
        </span>
      )}
    </button>
  );
}
