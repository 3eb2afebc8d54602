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
  /** Called whenever `busy` changes. */
  readonly onBusy?: (busy: boolean) => void;
}

/**
 * A queue of length one. A running request is left to finish and its answer is shown, because while a person drags, a
 * picture that is one step late is better than none; requests overtaken while waiting are never sent.
 */
export function latestWins<Request, Result>(parts: LatestWinsParts<Request, Result>): LatestWins<Request> {
  let running: AbortController | null = null;
  let waiting: { readonly request: Request } | null = null;

  const start = async (request: Request): Promise<void> => {
    const controller = new AbortController();
    running = controller;
    try {
      const result = await parts.run(request, controller.signal);
      if (running === controller) parts.deliver(result, request);
    } catch (error) {
      if (running === controller) parts.fail(error, request);
    }
    if (running !== controller) return;
    running = null;
    const next = waiting;
    waiting = null;
    if (next) void start(next.request);
    else parts.onBusy?.(false);
  };

  return {
    ask(request) {
      if (running) {
        waiting = { request };
        return;
      }
      parts.onBusy?.(true);
      void start(request);
    },
    stop() {
      waiting = null;
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
