import { closeSync, fstatSync, openSync, readSync } from "node:fs";
import { fileFault } from "../faults";

/** A file read at positions. Never reads past its end silently: a short read is a Fault that names the file. */
export class ByteFile {
  readonly size: number;
  private readonly descriptor: number;

  constructor(readonly path: string) {
    this.descriptor = openSync(path, "r");
    this.size = fstatSync(this.descriptor).size;
  }

  /** Fills `target` from `position`. */
  read(target: Uint8Array, position: number): void {
    for (let done = 0; done < target.length; ) {
      const got = readSync(this.descriptor, target, done, target.length - done, position + done);
      if (got === 0) {
        const expected = `${target.length} bytes from byte ${position}`;
        throw fileFault(this.path, expected, `the file's end after ${done} of them`, "fetch the file again");
      }
      done += got;
    }
  }

  close(): void {
    closeSync(this.descriptor);
  }
}

/** Reads big-endian header fields in order, a piece of the file at a time, and refuses to run past the file's end. */
export class HeaderCursor {
  position = 0;
  private piece = new Uint8Array(0);
  private pieceStart = 0;

  constructor(private readonly file: ByteFile) {}

  get remaining(): number {
    return this.file.size - this.position;
  }

  /** Throws unless `bytes` more bytes are in the file; call before allocating anything of a size read from it. */
  need(bytes: number, what: string): void {
    if (bytes <= this.remaining) return;
    const got = `${this.remaining} bytes up to the file's end`;
    throw fileFault(
      this.file.path,
      `${bytes} bytes for ${what}`,
      got,
      "the header is damaged or cut: fetch the file again",
    );
  }

  bytes(length: number, what: string): Uint8Array {
    this.need(length, what);
    const from = this.position - this.pieceStart;
    if (from < 0 || from + length > this.piece.length) {
      this.piece = new Uint8Array(Math.min(this.remaining, Math.max(length, 65_536)));
      this.pieceStart = this.position;
      this.file.read(this.piece, this.position);
    }
    const start = this.position - this.pieceStart;
    this.position += length;
    return this.piece.subarray(start, start + length);
  }

  uint32(what: string): number {
    const [a, b, c, d] = this.bytes(4, what);
    return a * 2 ** 24 + b * 2 ** 16 + c * 2 ** 8 + d;
  }

  /** An unsigned 64-bit number; beyond 2^53 it is inexact and larger than any file. */
  uint64(what: string): number {
    const high = this.uint32(what);
    return high * 2 ** 32 + this.uint32(what);
  }

  /** Skips to the next multiple of four bytes. */
  pad(length: number, what: string): void {
    this.bytes((4 - (length % 4)) % 4, what);
  }
}
