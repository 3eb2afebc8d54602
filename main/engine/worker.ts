import { faultData } from "../../core/model/errors";
import { JobFlags } from "./job";
import type { WorkerAnswer } from "./pool";
import { type TaskName, tasks } from "./tasks";

interface WorkerRequest {
  readonly task: TaskName;
  readonly args: never;
  readonly flags: Int32Array;
}

/** Entry of a worker thread: runs the named task. */
export default async function answer({ task, args, flags }: WorkerRequest): Promise<WorkerAnswer> {
  try {
    const job = new JobFlags(flags);
    job.poll();
    return { value: await tasks[task](args, job) };
  } catch (error) {
    return { fault: faultData(error) };
  }
}
