import { useEffect, useRef } from 'react';

/** Lets the phone's own back button lead out of a screen instead of out of the page, which may not open again without signal. */
export function useBackButton(inside: boolean, onBack: () => void): void {
  const leave = useRef(onBack);
  useEffect(() => {
    leave.current = onBack;
  }, [onBack]);
  useEffect(() => {
    if (!inside) return;
    history.pushState({ inside: true }, '');
    const onPop = () => leave.current();
    window.addEventListener('popstate', onPop);
    return () => {
      window.removeEventListener('popstate', onPop);
      if ((history.state as { inside?: boolean } | null)?.inside) history.back();
    };
  }, [inside]);
}
