import { existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { writeFileWhole, writeFully } from "../../../main/writers/atomic-file";
import { writeFolderAtomically } from "../../../main/writers/atomic-folder";

let place: string;
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), "strake-folder-"));
});
afterEach(() => {
  rmSync(place, { recursive: true, force: true });
});

const fillWith = (name: string, text: string) => async (stage: string) => {
  await writeFileWhole(join(stage, name), text);
};

describe("a folder written atomically", () => {
  test("holds what was put into its stage, and nothing lies beside it", async () => {
    const folder = join(place, "deep", "result");
    const answer = await writeFolderAtomically(folder, { overwrite: false }, async (stage) => {
      mkdirSync(join(stage, "figures"));
      await writeFileWhole(join(stage, "figures", "a.svg"), "<svg/>");
      return 7;
    });
    expect(answer).toBe(7);
    expect(readFileSync(join(folder, "figures", "a.svg"), "utf8")).toBe("<svg/>");
    expect(readdirSync(join(place, "deep"))).toEqual(["result"]);
  });

  test("is not there before the stage is full", async () => {
    const folder = join(place, "result");
    await writeFolderAtomically(folder, { overwrite: false }, async () => {
      expect(existsSync(folder)).toBe(false);
    });
    expect(existsSync(folder)).toBe(true);
  });

  test("refuses an existing folder, without filling anything", async () => {
    mkdirSync(join(place, "result"));
    let filled = false;
    const attempt = writeFolderAtomically(join(place, "result"), { overwrite: false }, async () => {
      filled = true;
    });
    await expect(attempt).rejects.toMatchObject({ tag: "output", where: join(place, "result") });
    expect(filled).toBe(false);
  });

  test("refuses to replace a file even when it may overwrite", async () => {
    writeFileSync(join(place, "result"), "mine");
    const attempt = writeFolderAtomically(join(place, "result"), { overwrite: true }, fillWith("a", "b"));
    await expect(attempt).rejects.toMatchObject({ tag: "output" });
    expect(readFileSync(join(place, "result"), "utf8")).toBe("mine");
  });

  test("replaces the whole of an old folder when it may overwrite", async () => {
    mkdirSync(join(place, "result"));
    writeFileSync(join(place, "result", "stale.csv"), "old");
    await writeFolderAtomically(join(place, "result"), { overwrite: true }, fillWith("fresh.csv", "new"));
    expect(readdirSync(join(place, "result"))).toEqual(["fresh.csv"]);
    expect(readdirSync(place)).toEqual(["result"]);
  });

  test("leaves the old folder as it was when filling fails", async () => {
    mkdirSync(join(place, "result"));
    writeFileSync(join(place, "result", "old.csv"), "old");
    const attempt = writeFolderAtomically(join(place, "result"), { overwrite: true }, async (stage) => {
      writeFileSync(join(stage, "half.csv"), "half");
      throw new RangeError("broken off");
    });
    await expect(attempt).rejects.toThrow("broken off");
    expect(readdirSync(place)).toEqual(["result"]);
    expect(readdirSync(join(place, "result"))).toEqual(["old.csv"]);
  });

  test("leaves nothing behind when it is cancelled while filling", async () => {
    const stop = new AbortController();
    const attempt = writeFolderAtomically(
      join(place, "result"),
      { overwrite: false, signal: stop.signal },
      async () => {
        stop.abort();
      },
    );
    await expect(attempt).rejects.toMatchObject({ tag: "cancelled" });
    expect(readdirSync(place)).toEqual([]);
  });

  test("keeps what another writer put there in the meantime", async () => {
    const folder = join(place, "result");
    const attempt = writeFolderAtomically(folder, { overwrite: false }, async () => {
      mkdirSync(folder);
      writeFileSync(join(folder, "theirs"), "first");
    });
    await expect(attempt).rejects.toMatchObject({ tag: "output" });
    expect(readdirSync(folder)).toEqual(["theirs"]);
    expect(readdirSync(place)).toEqual(["result"]);
  });
});

describe("a file written whole", () => {
  test("replaces an older one and leaves no part file", async () => {
    const path = join(place, "summary.json");
    writeFileSync(path, "old and longer than the new one");
    await writeFileWhole(path, "neu: µ");
    expect(readFileSync(path, "utf8")).toBe("neu: µ");
    expect(readdirSync(place)).toEqual(["summary.json"]);
  });

  test("is a fault about the output where there is no folder for it", async () => {
    const attempt = writeFileWhole(join(place, "none", "a.txt"), "x");
    await expect(attempt).rejects.toMatchObject({ tag: "output", where: join(place, "none", "a.txt") });
  });

  test("is finished although the system takes a few bytes at a time", async () => {
    const taken: number[] = [];
    const stingy = {
      write: async (bytes: Uint8Array, offset: number, length: number) => {
        const part = Math.min(3, length);
        taken.push(...bytes.subarray(offset, offset + part));
        return { bytesWritten: part, buffer: bytes };
      },
    };
    await writeFully(stingy as never, Uint8Array.from([1, 2, 3, 4, 5, 6, 7, 8]));
    expect(taken).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
  });

  test("is an error, not an endless loop, where the disk takes nothing", async () => {
    const full = { write: async () => ({ bytesWritten: 0, buffer: new Uint8Array() }) };
    await expect(writeFully(full as never, new Uint8Array(4))).rejects.toThrow("0 of 4 bytes");
  });
});
