import type { Port } from "./port";

export interface MemoryPortOptions {
  /** Runs its argument soon, in order and not at once; a microtask by default. */
  readonly later?: (work: () => void) => void;
  /** Copies a message and throws where it is no plain data; the platform's structuredClone by default, where it has one. */
  readonly clone?: (message: unknown) => unknown;
}

function platformClone(message: unknown): unknown {
  const { structuredClone } = globalThis as { structuredClone?: (value: unknown) => unknown };
  return structuredClone ? structuredClone(message) : message;
}

interface End {
  readonly port: Port;
  deliver(message: unknown): void;
  ended(): void;
}

function makeEnd(other: () => End, shared: { open: boolean }, options: Required<MemoryPortOptions>): End {
  const messageListeners: ((message: unknown) => void)[] = [];
  const closeListeners: (() => void)[] = [];
  return {
    port: {
      post(message) {
        if (!shared.open) return;
        const copy = options.clone(message);
        options.later(() => shared.open && other().deliver(copy));
      },
      onMessage: (listener) => void messageListeners.push(listener),
      onClose: (listener) => void closeListeners.push(listener),
      close() {
        if (!shared.open) return;
        shared.open = false;
        options.later(() => {
          for (const listener of closeListeners) listener();
          other().ended();
        });
      },
    },
    deliver(message) {
      for (const listener of messageListeners) listener(message);
    },
    ended() {
      for (const listener of closeListeners) listener();
    },
  };
}

/**
 * Two ends of a channel within one thread, for tests and for an engine in the caller's own process. Messages are copied
 * when posted and arrive later, in order; what is posted on a closed channel is dropped; closing either end tells both.
 */
export function memoryPortPair(options: MemoryPortOptions = {}): readonly [Port, Port] {
  const { later = (work) => void Promise.resolve().then(work), clone = platformClone } = options;
  const shared = { open: true };
  const first: End = makeEnd(() => second, shared, { later, clone });
  const second: End = makeEnd(() => first, shared, { later, clone });
  return [first.port, second.port];
}
