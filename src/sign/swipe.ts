export type Touch = { x: number; y: number; at: number };

/** Which way a finger swept, or null where it was a tap, a scroll or a slow drag. */
export function swipeOf(from: Touch, to: Touch): 'left' | 'right' | null {
  const across = to.x - from.x;
  const down = to.y - from.y;
  if (Math.abs(across) < 60 || Math.abs(across) < 2 * Math.abs(down) || to.at - from.at > 800) return null;
  return across < 0 ? 'left' : 'right';
}
