/** Where a long call stands. `total` 0 means that the length is not known yet. */
export interface Progress {
  readonly step: string;
  readonly done: number;
  readonly total: number;
}

export interface CallOptions {
  readonly signal?: AbortSignalLike;
  readonly onProgress?: (progress: Progress) => void;
}

/** The part of AbortSignal the contract needs; typed here since core knows no DOM. */
export interface AbortSignalLike {
  readonly aborted: boolean;
  addEventListener(type: "abort", listener: () => void): void;
  removeEventListener(type: "abort", listener: () => void): void;
}
