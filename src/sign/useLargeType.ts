import { useState } from 'react';
import { recall, remember } from './remembered.ts';

/** The large-type switch of the crew cards, remembered by the device. */
export function useLargeType(): [boolean, (large: boolean) => void] {
  const [large, setLarge] = useState(() => recall('large') === true);
  return [
    large,
    (next) => {
      setLarge(next);
      remember('large', next);
    },
  ];
}
