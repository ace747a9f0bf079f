import type { Reading } from '#shared/signons/signons.api.ts';

/** What the flow needs to know of a reading: how many cards, and each question's right answer and card. */
export type Script = {
  cards: number;
  questions: { id: string; right: number; card: number | null }[];
};

export type Place = { at: 'card'; index: number } | { at: 'question'; index: number } | { at: 'sign' };

/** How far somebody has come with one statement. Plain JSON, so that the phone can remember it. */
export type Flow = {
  place: Place;
  /** How many cards from the first have been opened. */
  seen: number;
  /** Every answer given, in order, by question. */
  tries: Record<string, number[]>;
  /** Milliseconds that cards stood open in sight. */
  readingMs: number;
  /** The question to go back to, while its card is being read again. */
  rereading: number | null;
};

export type Move =
  | { do: 'next' }
  | { do: 'back' }
  | { do: 'answer'; choice: number }
  | { do: 'reread' }
  | { do: 'read'; ms: number };

export function scriptOf({ cards, questions }: Pick<Reading, 'cards' | 'questions'>): Script {
  return {
    // The opening card stands before the steps.
    cards: cards.length + 1,
    questions: questions.map(({ id, right, stepId }) => {
      const card = cards.findIndex((step) => step.stepId === stepId);
      return { id, right, card: card === -1 ? null : card + 1 };
    }),
  };
}

export const beginFlow = (): Flow => ({
  place: { at: 'card', index: 0 },
  seen: 1,
  tries: {},
  readingMs: 0,
  rereading: null,
});

/** Whether a question's last answer is the right one. */
export function isAnswered({ questions }: Script, { tries }: Flow, index: number): boolean {
  const question = questions[index];
  return question !== undefined && tries[question.id]?.at(-1) === question.right;
}

/** Whether the way is open to the signature: every card opened, every question answered rightly. */
export function maySign(script: Script, flow: Flow): boolean {
  return (
    flow.seen >= script.cards && script.questions.every((_question, index) => isAnswered(script, flow, index))
  );
}

/** The flow after one move. A move that is not open there changes nothing: nobody comes to the signature past a card or a question. */
export function moveOn(script: Script, flow: Flow, move: Move): Flow {
  if (move.do === 'next') return next(script, flow);
  if (move.do === 'back') return back(script, flow);
  if (move.do === 'answer') return answer(script, flow, move.choice);
  if (move.do === 'reread') return reread(script, flow);
  return { ...flow, readingMs: Math.min(86_400_000, flow.readingMs + Math.max(0, Math.round(move.ms))) };
}

function next(script: Script, flow: Flow): Flow {
  const { place, rereading } = flow;
  if (place.at === 'sign') return flow;
  if (place.at === 'question') {
    if (!isAnswered(script, flow, place.index)) return flow;
    return { ...flow, place: questionOrSign(script, place.index + 1) };
  }
  if (rereading !== null) return { ...flow, rereading: null, place: { at: 'question', index: rereading } };
  if (place.index + 1 >= script.cards) return { ...flow, place: questionOrSign(script, 0) };
  const index = place.index + 1;
  return { ...flow, place: { at: 'card', index }, seen: Math.max(flow.seen, index + 1) };
}

const questionOrSign = ({ questions }: Script, index: number): Place =>
  index < questions.length ? { at: 'question', index } : { at: 'sign' };

function back(script: Script, flow: Flow): Flow {
  const { place } = flow;
  if (place.at === 'card' && place.index === 0) return flow;
  if (place.at === 'card') return { ...flow, place: { at: 'card', index: place.index - 1 } };
  const question = place.at === 'sign' ? script.questions.length - 1 : place.index - 1;
  if (question >= 0) return { ...flow, place: { at: 'question', index: question } };
  return { ...flow, place: { at: 'card', index: script.cards - 1 } };
}

/** The contract keeps at most twenty tries a question; past that the last one replaces the one before. */
const mostTries = 20;

function answer(script: Script, flow: Flow, choice: number): Flow {
  if (flow.place.at !== 'question' || isAnswered(script, flow, flow.place.index)) return flow;
  const question = script.questions[flow.place.index];
  if (!question) return flow;
  const tries = [...(flow.tries[question.id] ?? []).slice(0, mostTries - 1), choice];
  return { ...flow, tries: { ...flow.tries, [question.id]: tries } };
}

function reread(script: Script, flow: Flow): Flow {
  if (flow.place.at !== 'question') return flow;
  const card = script.questions[flow.place.index]?.card ?? null;
  if (card === null) return flow;
  return { ...flow, rereading: flow.place.index, place: { at: 'card', index: card } };
}

/** A remembered flow, or a new one where it does not fit the reading any more. */
export function resumeFlow(script: Script, remembered: unknown): Flow {
  const flow = remembered as Partial<Flow> | null;
  if (!flow?.place || !flow.tries || typeof flow.seen !== 'number' || typeof flow.readingMs !== 'number')
    return beginFlow();
  const resumed: Flow = {
    place: flow.place,
    seen: flow.seen,
    tries: flow.tries,
    readingMs: flow.readingMs,
    rereading: flow.rereading ?? null,
  };
  return fits(script, resumed) ? resumed : beginFlow();
}

function fits(script: Script, flow: Flow): boolean {
  const { place } = flow;
  if (place.at === 'sign') return maySign(script, flow);
  if (place.at === 'question') return flow.seen >= script.cards && place.index < script.questions.length;
  return place.at === 'card' && place.index >= 0 && place.index < Math.min(flow.seen, script.cards);
}
