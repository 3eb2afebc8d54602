import type { Progress } from "../../core/contract/job";

/** Where progress goes: a terminal gets a bar that redraws itself, anything else one line a step. */
export interface ProgressStream {
  readonly isTTY?: boolean;
  write(text: string): unknown;
}

const barCells = 24;

export function progressPrinter(stream: ProgressStream): { show: (progress: Progress) => void; end: () => void } {
  let step = "";
  let open = false;
  const show = (progress: Progress): void => {
    if (stream.isTTY) {
      const share = progress.total > 0 ? progress.done / progress.total : 0;
      const full = Math.round(share * barCells);
      const bar = `${"█".repeat(full)}${"░".repeat(barCells - full)}`;
      stream.write(`\r\u001b[2K${bar} ${progress.step}`);
      open = true;
    } else if (progress.step !== step) {
      stream.write(`${progress.step}\n`);
    }
    step = progress.step;
  };
  const end = (): void => {
    if (open) stream.write("\r\u001b[2K");
    open = false;
  };
  return { show, end };
}
