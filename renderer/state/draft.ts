import type { OpenStudy } from "../../core/contract/engine";

/** The part of the browser's storage that drafts need. */
export interface DraftStorage {
  getItem(key: string): string | null;
  setItem(key: string, value: string): void;
  removeItem(key: string): void;
}

/** Unsaved edits of a study, kept where a killed window cannot lose them. */
export interface Drafts {
  keep(open: OpenStudy): void;
  forget(open: OpenStudy): void;
  /** The study kept for this one, unchecked, or null. Damaged entries count as none. */
  find(open: OpenStudy): unknown | null;
}

/** Drafts by study path. Storage that is full or refused is passed over: a draft is a safety net, not a promise to save. */
export function drafts(storage: DraftStorage | null): Drafts {
  const attempt = <T>(work: (storage: DraftStorage) => T): T | null => {
    try {
      return storage ? work(storage) : null;
    } catch {
      return null;
    }
  };
  return {
    keep: (open) => void attempt((store) => store.setItem(draftKey(open), JSON.stringify(open.study))),
    forget: (open) => void attempt((store) => store.removeItem(draftKey(open))),
    find: (open) =>
      attempt((store) => {
        const text = store.getItem(draftKey(open));
        return text === null || text === JSON.stringify(open.study) ? null : (JSON.parse(text) as unknown);
      }),
  };
}

/** Calls `work` at most once in `pauseMs`, always with the newest value, and at the latest `pauseMs` after it came. */
export function throttled<T>(work: (value: T) => void, pauseMs: number): (value: T) => void {
  let waiting: { readonly value: T } | null = null;
  return (value) => {
    const idle = waiting === null;
    waiting = { value };
    if (!idle) return;
    setTimeout(() => {
      const latest = waiting;
      waiting = null;
      if (latest) work(latest.value);
    }, pauseMs);
  };
}

function draftKey(open: OpenStudy): string {
  return `strake.draft ${open.path === "" ? `${open.folder} ${JSON.stringify(open.study.grids)}` : open.path}`;
}
