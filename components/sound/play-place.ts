/** The tick that sounds, null when nothing does; a store of its own, to be listened to. */
export interface PlayPlace {
  get(): number | null;
  set(tick: number | null): void;
  /** Gives what ends the listening. */
  listen(listener: () => void): () => void;
}

export function createPlayPlace(): PlayPlace {
  let now: number | null = null;
  const listeners = new Set<() => void>();
  return {
    get: () => now,
    set: (tick) => {
      if (tick === now) return;
      now = tick;
      for (const listener of listeners) listener();
    },
    listen: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
