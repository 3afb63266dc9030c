/** What a call resolves to when a newer one took its place before it ran. */
export const SUPERSEDED = Symbol("superseded");

/**
 * Runs one call at a time. Of the calls that come while one runs, only the newest is kept and run next; the others resolve to
 * SUPERSEDED at once. No queue builds up behind a slow answer, and the last call is always answered.
 */
export function latestWins<Question, Reply>(
  run: (question: Question) => Promise<Reply>,
): (question: Question) => Promise<Reply | typeof SUPERSEDED> {
  interface Waiting {
    readonly question: Question;
    readonly resolve: (reply: Reply | typeof SUPERSEDED) => void;
    readonly reject: (reason: unknown) => void;
  }
  let waiting: Waiting | null = null;
  let running = false;

  const drain = async (): Promise<void> => {
    running = true;
    while (waiting !== null) {
      const next: Waiting = waiting;
      waiting = null;
      try {
        next.resolve(await run(next.question));
      } catch (reason) {
        next.reject(reason);
      }
    }
    running = false;
  };

  return (question) =>
    new Promise((resolve, reject) => {
      waiting?.resolve(SUPERSEDED);
      waiting = { question, resolve, reject };
      if (!running) void drain();
    });
}
