import { readFileSync, writeFileSync } from 'node:fs';

/** Complex array in the toolbox's own file pair (.hdr, .cfl): column-major complex float32. */
export interface ComplexArray {
  readonly dims: readonly number[];
  /** Interleaved real and imaginary parts. */
  readonly data: Float32Array;
}

export function readCfl(path: string): ComplexArray {
  const dims = readFileSync(`${path}.hdr`, 'utf8').split('\n')[1]!.trim().split(/\s+/).map(Number);
  const bytes = readFileSync(`${path}.cfl`);
  const copy = new ArrayBuffer(bytes.byteLength);
  new Uint8Array(copy).set(bytes);
  return { dims, data: new Float32Array(copy) };
}

export function writeCfl(path: string, array: ComplexArray): void {
  const dims = [...array.dims, ...Array<number>(Math.max(0, 16 - array.dims.length)).fill(1)];
  writeFileSync(`${path}.hdr`, `# Dimensions\n${dims.join(' ')}\n`);
  writeFileSync(`${path}.cfl`, new Uint8Array(array.data.buffer, array.data.byteOffset, array.data.byteLength));
}
