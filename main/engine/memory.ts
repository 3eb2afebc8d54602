import { totalmem } from "node:os";
import { Fault } from "../../core/model/errors";

/** Bytes one record may take: half of the machine's memory, or STRAKE_MEMORY_MB. */
export function memoryBudgetBytes(): number {
  const wanted = Number(process.env.STRAKE_MEMORY_MB);
  return wanted > 0 ? wanted * 2 ** 20 : totalmem() / 2;
}

/** Refuses a record that would not fit, before memory is asked for. */
export function requireMemory(bytes: number, where: string): void {
  const budget = memoryBudgetBytes();
  if (bytes <= budget) return;
  throw new Fault({
    tag: "memory",
    where,
    expected: `at most ${megabytes(budget)} of memory for one record`,
    got: `a region and period that take ${megabytes(bytes)}`,
    advice: "choose a smaller region or a shorter period, or raise STRAKE_MEMORY_MB",
  });
}

function megabytes(bytes: number): string {
  return `${Math.ceil(bytes / 2 ** 20).toLocaleString("en")} MB`;
}
