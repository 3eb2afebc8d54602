import { Packr } from "msgpackr";
import { Fault } from "../model/errors";

/**
 * How a message becomes the bytes of one binary WebSocket frame, in Node and in a browser alike: MessagePack, typed arrays
 * as the extension "t" (one byte for the type, then the raw little-endian values), objects as maps with text keys, no
 * records, no references, no strings bundled. Plain MessagePack otherwise, so that an independent reader can follow.
 */
const frameOptions = {
  useRecords: false,
  mapsAsObjects: true,
  moreTypes: true,
  structuredClone: false,
  copyBuffers: true,
  int64AsType: "number",
} as const;

/** Largest frame taken from a window, in bytes: requests are studies and names. */
export const largestRequestBytes = 4 * 2 ** 20;
/** Largest frame sent to a window, in bytes: answers are display-sized. */
export const largestAnswerBytes = 256 * 2 ** 20;

const packer = new Packr({ ...frameOptions });

function sizeFault(bytes: number, limitBytes: number): Fault {
  return new Fault({
    tag: "memory",
    where: "message",
    expected: `at most ${limitBytes} bytes`,
    got: `${bytes} bytes`,
    advice: "choose a smaller region or fewer columns",
  });
}

/**
 * The bytes of a message; a fresh array. Typed arrays keep their type; -0 outside of typed arrays becomes 0; undefined
 * stays. Throws a Fault tagged "memory" above `limitBytes`.
 */
export function encodeFrame(message: unknown, limitBytes: number): Uint8Array<ArrayBuffer> {
  const packed: Uint8Array = packer.pack(message);
  if (packed.byteLength > limitBytes) throw sizeFault(packed.byteLength, limitBytes);
  return new Uint8Array(packed);
}

/**
 * The message in `bytes`. Typed arrays are copies of their own, aligned, of the type they were sent as. Throws where the
 * bytes are too many, no MessagePack, cut short or followed by more; a length claimed beyond the bytes allots no memory.
 */
export function decodeFrame(bytes: Uint8Array, limitBytes: number): unknown {
  if (bytes.byteLength > limitBytes) throw sizeFault(bytes.byteLength, limitBytes);
  // A subclass such as Node's Buffer would come back as itself in place of Uint8Array.
  return packer.unpack(new Uint8Array(bytes.buffer, bytes.byteOffset, bytes.byteLength));
}
