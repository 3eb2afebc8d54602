/** Runs one request at a time; while it runs only the newest further request is kept. */
export interface LatestWins<Request> {
  ask(request: Request): void;
  /** Drops the waiting request, aborts the running one and ignores its answer. */
  stop(): void;
  readonly busy: boolean;
}

export interface LatestWinsParts<Request, Result> {
  readonly run: (request: Request, signal: AbortSignal) => Promise<Result>;
  readonly deliver: (result: Result, request: Request) => void;
  readonly fail: (error: unknown, request: Request) => void;
  /** How long a request that is overtaken may go on, in milliseconds; left out: until it is done. */
  readonly patienceMs?: number;
  /** Called whenever `busy` changes. */
  readonly onBusy?: (busy: boolean) => void;
}

/**
 * A queue of length one. A running request is left to finish and its answer is shown, because while a person drags, a
 * picture that is one step late is better than none; one that takes longer than the patience is aborted once another waits.
 * Requests overtaken while waiting are never sent.
 */
export function latestWins<Request, Result>(parts: LatestWinsParts<Request, Result>): LatestWins<Request> {
  let running: AbortController | null = null;
  let startedAt = 0;
  let overtaking: ReturnType<typeof setTimeout> | null = null;
  let waiting: { readonly request: Request } | null = null;

  const start = async (request: Request): Promise<void> => {
    const controller = new AbortController();
    running = controller;
    startedAt = performance.now();
    try {
      const result = await parts.run(request, controller.signal);
      if (running === controller) parts.deliver(result, request);
    } catch (error) {
      if (running === controller) parts.fail(error, request);
    }
    if (running === controller) goOn();
  };

  /** Leaves what is running, done or not, for what waits. */
  const goOn = (): void => {
    if (overtaking !== null) clearTimeout(overtaking);
    overtaking = null;
    running = null;
    const next = waiting;
    waiting = null;
    if (next) void start(next.request);
    else parts.onBusy?.(false);
  };

  const overtake = (): void => {
    const controller = running;
    goOn();
    controller?.abort();
  };

  return {
    ask(request) {
      if (running) {
        waiting = { request };
        if (parts.patienceMs === undefined) return;
        overtaking ??= setTimeout(overtake, Math.max(0, startedAt + parts.patienceMs - performance.now()));
        return;
      }
      parts.onBusy?.(true);
      void start(request);
    },
    stop() {
      waiting = null;
      if (overtaking !== null) clearTimeout(overtaking);
      overtaking = null;
      const controller = running;
      running = null;
      controller?.abort();
      if (controller) parts.onBusy?.(false);
    },
    get busy() {
      return running !== null;
    },
  };
}
