// Asking again while an answer is under way: the newest question counts, late answers are dropped.

/**
 * Waits until `quiet_ms` have passed without a new call, then runs; while a run is under way the next waits for it.
 * `isNewest` tells a run whether its answer is still wanted.
 */
export function newestOnly<Q>(
  quiet_ms: number,
  run: (question: Q, isNewest: () => boolean) => Promise<void>,
): (question: Q) => void {
  let ticket = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let running = false;
  let waiting: { readonly question: Q; readonly ticket: number } | null = null;

  const go = async (question: Q, mine: number): Promise<void> => {
    running = true;
    try {
      await run(question, () => mine === ticket);
    } finally {
      running = false;
      const next = waiting;
      waiting = null;
      if (next !== null) void go(next.question, next.ticket);
    }
  };

  return (question) => {
    const mine = ++ticket;
    clearTimeout(timer);
    timer = setTimeout(() => {
      if (running) waiting = { question, ticket: mine };
      else void go(question, mine);
    }, quiet_ms);
  };
}
