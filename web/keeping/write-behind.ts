/** Writes some time after changes, one write at a time. */
export interface WriteBehind {
  /** Notes a change. */
  later(): void;
  /** Writes at once; resolves when what was there to be written at the call is written. */
  now(): Promise<void>;
}

/**
 * @param settled a write begins so long after the last change, ms
 * @param atMost and at the latest so long after the first, ms
 */
export function writeBehind(write: () => Promise<void>, settled: number, atMost: number): WriteBehind {
  let waiting: ReturnType<typeof setTimeout> | undefined;
  let since: number | null = null;
  let running: Promise<void> = Promise.resolve();

  const now = (): Promise<void> => {
    clearTimeout(waiting);
    since = null;
    running = running.then(write);
    return running;
  };
  return {
    now,
    later() {
      const at = Date.now();
      since ??= at;
      clearTimeout(waiting);
      waiting = setTimeout(now, Math.max(0, Math.min(settled, since + atMost - at)));
    },
  };
}
