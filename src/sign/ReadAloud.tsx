import { useEffect, useRef, useState } from 'react';
import { BigButton } from './pieces.tsx';
import { readAloud, useVoice } from './speech.ts';

/** Reads the lines aloud with the phone's own voice; says plainly where there is none. */
export function ReadAloud({ lines, language }: { lines: string[]; language: string }) {
  const voice = useVoice(language);
  const stop = useRef<(() => void) | null>(null);
  const [speaking, setSpeaking] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  useEffect(() => () => stop.current?.(), []);
  if (voice === 'none')
    return <p className="text-sm text-ink-soft">This device has no voice to read aloud with.</p>;
  const toggle = () => {
    if (voice === 'looking') return;
    if (speaking) {
      stop.current?.();
      setSpeaking(false);
      return;
    }
    setTrouble(null);
    setSpeaking(true);
    stop.current = readAloud(lines, voice, (words) => {
      setSpeaking(false);
      setTrouble(words);
    });
  };
  return (
    <>
      <BigButton kind="quiet" disabled={voice === 'looking'} aria-pressed={speaking} onClick={toggle}>
        {speaking ? 'Stop reading' : 'Read aloud'}
      </BigButton>
      <span role="status" className="text-sm text-ink-soft">
        {trouble}
      </span>
    </>
  );
}
