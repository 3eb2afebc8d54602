import type { CallOptions, Progress } from "../../core/contract/job";
import { Fault } from "../../core/model/errors";

const cancelSlot = 0;
const doneSlot = 1;

/** What a worker needs of a job: polls for cancel, counts what is done. Backed by shared memory. */
export class JobFlags {
  constructor(readonly shared: Int32Array) {}

  /** Throws when the job was cancelled; called once a row or plane. */
  poll(): void {
    if (Atomics.load(this.shared, cancelSlot) !== 0) throw cancelledFault();
  }

  count(): void {
    Atomics.add(this.shared, doneSlot, 1);
  }
}

export function cancelledFault(): Fault {
  return new Fault({
    tag: "cancelled",
    where: "the work under way",
    expected: "time to finish",
    got: "a cancel",
    advice: "start it again when wanted",
  });
}

/** One call's progress and cancel, on the engine's side. */
export class Job {
  #flags = new Int32Array(new SharedArrayBuffer(8));
  #abort: () => void;
  #timer: ReturnType<typeof setInterval> | null = null;

  constructor(private readonly options: CallOptions = {}) {
    this.#abort = () => Atomics.store(this.#flags, cancelSlot, 1);
    options.signal?.addEventListener("abort", this.#abort);
    if (options.signal?.aborted) this.#abort();
  }

  get flags(): Int32Array {
    return this.#flags;
  }

  get cancelled(): boolean {
    return Atomics.load(this.#flags, cancelSlot) !== 0;
  }

  throwIfCancelled(): void {
    if (this.cancelled) throw cancelledFault();
  }

  report(progress: Progress): void {
    this.options.onProgress?.(progress);
  }

  /** Runs a step whose workers count up to `total`; reports ten times a second. */
  async step<T>(step: string, total: number, work: () => Promise<T>): Promise<T> {
    this.throwIfCancelled();
    Atomics.store(this.#flags, doneSlot, 0);
    const tell = () => this.report({ step, done: Math.min(total, Atomics.load(this.#flags, doneSlot)), total });
    tell();
    this.#timer = setInterval(tell, 100);
    try {
      const result = await work();
      this.report({ step, done: total, total });
      return result;
    } finally {
      clearInterval(this.#timer);
    }
  }

  close(): void {
    this.options.signal?.removeEventListener("abort", this.#abort);
  }
}
