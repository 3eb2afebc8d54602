/** Arrays over shared memory: every worker sees the same bytes. */
export function sharedFloat64(length: number): Float64Array {
  return new Float64Array(new SharedArrayBuffer(length * 8));
}

export function sharedFloat32(length: number): Float32Array {
  return new Float32Array(new SharedArrayBuffer(length * 4));
}

export function sharedUint8(values: Uint8Array): Uint8Array {
  const shared = new Uint8Array(new SharedArrayBuffer(values.length));
  shared.set(values);
  return shared;
}
