/** Small facts that this phone remembers. A phone that refuses storage remembers nothing, and nothing fails. */
export function remember(key: string, value: unknown): void {
  try {
    localStorage.setItem(`toeboard.${key}`, JSON.stringify(value));
  } catch {
    // Private mode or full: the screens say so where it matters.
  }
}

export function recall(key: string): unknown {
  try {
    return JSON.parse(localStorage.getItem(`toeboard.${key}`) ?? 'null');
  } catch {
    return null;
  }
}

export function forget(key: string): void {
  try {
    localStorage.removeItem(`toeboard.${key}`);
  } catch {
    // As above.
  }
}

/** Drops remembered facts whose key begins with this, all but the newest few, so that old statements don't fill the phone. */
export function forgetAll(prefix: string, { keep = 0 }: { keep?: number } = {}): void {
  try {
    const keys = Object.keys(localStorage).filter((key) => key.startsWith(`toeboard.${prefix}`));
    for (const key of keys.slice(0, Math.max(0, keys.length - keep))) localStorage.removeItem(key);
  } catch {
    // As above.
  }
}
