import { availableParallelism } from "node:os";
import { Piscina } from "piscina";
import { Fault, type FaultData } from "../../core/model/errors";
import type { Job } from "./job";
import { findPlaces } from "./process/places";
import type { TaskArguments, TaskName, TaskResult } from "./tasks";

/** What a worker answers: errors travel as data. */
export type WorkerAnswer = { readonly value: unknown } | { readonly fault: FaultData };

/** Threads that run the engine's tasks over shared memory, so that the engine's own thread stays free to answer. */
export class WorkerPool {
  readonly size: number;
  readonly #threads: Piscina;

  constructor(size = Math.max(1, Math.min(8, availableParallelism()))) {
    this.size = size;
    this.#threads = new Piscina({
      filename: findPlaces(import.meta.url).workerEntry,
      minThreads: size,
      maxThreads: size,
      idleTimeout: Number.POSITIVE_INFINITY,
    });
  }

  async run<N extends TaskName>(task: N, args: TaskArguments<N>, job: Job): Promise<TaskResult<N>> {
    job.throwIfCancelled();
    const answer = (await this.#threads.run({ task, args, flags: job.flags })) as WorkerAnswer;
    if ("fault" in answer) throw new Fault(answer.fault);
    return answer.value as TaskResult<N>;
  }

  /** Runs one task a range, ranges sharing 0 … count about evenly; results in order. */
  async share<N extends TaskName>(
    task: N,
    count: number,
    args: (range: readonly [from: number, to: number]) => TaskArguments<N>,
    job: Job,
    pieces = this.size * 4,
  ): Promise<TaskResult<N>[]> {
    const size = Math.max(1, Math.ceil(count / pieces));
    const ranges: [number, number][] = [];
    for (let from = 0; from < count; from += size) ranges.push([from, Math.min(count, from + size)]);
    const settled = await Promise.allSettled(ranges.map((range) => this.run(task, args(range), job)));
    for (const outcome of settled) if (outcome.status === "rejected") throw outcome.reason;
    return settled.map((outcome) => (outcome as PromiseFulfilledResult<TaskResult<N>>).value);
  }

  async close(): Promise<void> {
    await this.#threads.destroy();
  }
}
