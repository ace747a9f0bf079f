import { useEffect, useState } from 'react';

export type Voice = 'looking' | 'none' | SpeechSynthesisVoice;

/** The phone's own voice for a language. Voices arrive late on many phones; after two seconds without one there is none. */
export function useVoice(language: string): Voice {
  const [voice, setVoice] = useState<Voice>(() => voiceFor(language) ?? (canSpeak() ? 'looking' : 'none'));
  useEffect(() => {
    if (!canSpeak()) return;
    const look = () => setVoice((known) => voiceFor(language) ?? known);
    speechSynthesis.addEventListener?.('voiceschanged', look);
    const late = setTimeout(() => setVoice(voiceFor(language) ?? 'none'), 2000);
    return () => {
      speechSynthesis.removeEventListener?.('voiceschanged', look);
      clearTimeout(late);
    };
  }, [language]);
  return voice;
}

const canSpeak = () => 'speechSynthesis' in window && 'SpeechSynthesisUtterance' in window;

function voiceFor(language: string): SpeechSynthesisVoice | null {
  if (!canSpeak()) return null;
  const fitting = speechSynthesis
    .getVoices()
    .filter(({ lang }) => lang.toLowerCase().replace('_', '-').split('-')[0] === language);
  // A voice on the phone itself speaks without signal.
  return fitting.find(({ localService }) => localService) ?? fitting[0] ?? null;
}

/** Reads lines aloud one after another and returns how to stop. Short pieces, because some phones fall silent in long ones. */
export function readAloud(
  lines: string[],
  voice: SpeechSynthesisVoice,
  onEnd: (trouble: string | null) => void,
): () => void {
  speechSynthesis.cancel();
  let stopped = false;
  const speak = (index: number) => {
    const line = lines[index];
    if (stopped) return;
    if (line === undefined) return onEnd(null);
    const utterance = new SpeechSynthesisUtterance(line);
    utterance.voice = voice;
    utterance.lang = voice.lang;
    utterance.rate = 0.95;
    utterance.onend = () => speak(index + 1);
    utterance.onerror = () => {
      if (!stopped) onEnd('This phone could not read it aloud.');
    };
    speechSynthesis.speak(utterance);
  };
  speak(0);
  return () => {
    stopped = true;
    speechSynthesis.cancel();
  };
}
