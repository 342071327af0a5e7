import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { OPEN } from './bytes.ts';
import type { InstanceTable } from './instance-table.ts';

/** What `plain-index.as.ts` exports; its comments say what each does. */
interface Kernel {
  readonly memory: { readonly buffer: ArrayBuffer };
  readonly windowSize: { readonly value: number };
  readonly mostRows: { readonly value: number };
  windowAt(): number;
  idsAt(): number;
  opensAt(): number;
  codesAt(): number;
  reset(): void;
  learn(at: number, length: number, code: number): number;
  index(from: number, to: number, base: number): number;
  rows(): number;
  isCutOff(): number;
}

declare const WebAssembly: {
  readonly Module: new (bytes: Uint8Array) => object;
  readonly Instance: new (module: object) => { readonly exports: Kernel };
};

/**
 * Indexes the plainest instances, which are nearly all of a file, a window at a time in WebAssembly. It stops at whatever is not
 * plain, for DataScanner to read that and come back: the rules of the format stand there alone. Files are read one after
 * another by the same instance, `begin` tells of the next.
 */
export class PlainIndex {
  private readonly kernel: Kernel;
  private readonly window: Uint8Array;
  private readonly ids: Uint32Array;
  private readonly opens: Uint32Array;
  private readonly codes: Uint16Array;
  private bytes: Uint8Array = new Uint8Array(0);
  /** The window holds the bytes of the file from `base` on, so many. */
  private base = 0;
  private filled = 0;

  /** @param code of `plain-index.wasm` */
  constructor(code: Uint8Array) {
    const kernel = new WebAssembly.Instance(new WebAssembly.Module(code)).exports;
    const { buffer } = kernel.memory;
    const rows = kernel.mostRows.value;
    this.kernel = kernel;
    this.window = new Uint8Array(buffer, kernel.windowAt(), kernel.windowSize.value);
    this.ids = new Uint32Array(buffer, kernel.idsAt(), rows);
    this.opens = new Uint32Array(buffer, kernel.opensAt(), rows);
    this.codes = new Uint16Array(buffer, kernel.codesAt(), rows);
  }

  begin(bytes: Uint8Array): void {
    this.bytes = bytes;
    this.base = 0;
    this.filled = 0;
    this.kernel.reset();
  }

  /** Lets go of the file. */
  end(): void {
    this.bytes = new Uint8Array(0);
    this.filled = 0;
  }

  /** Adds the plain instances from `at` on to the table; the offset after them. */
  index(at: number, table: InstanceTable): number {
    const { kernel } = this;
    let p = at;
    if (p < this.base || p >= this.base + this.filled) this.fill(p);
    for (;;) {
      const from = p;
      p = this.base + kernel.index(from - this.base, this.filled, this.base);
      const rows = kernel.rows();
      if (rows > 0) table.addAll(this.ids, this.opens, this.codes, rows);
      // An instance longer than the window, and the last ones of the file, are left to the scanner.
      const isMore = kernel.isCutOff() !== 0 && p > this.base && this.base + this.filled < this.bytes.length;
      if (!isMore) return p;
      this.fill(p);
    }
  }

  /** The keyword from `from` to `end` has this code from now on. */
  learn(from: number, end: number, code: number): void {
    const at = from - this.base;
    if (at >= 0 && at + end - from <= this.filled && this.bytes[end] === OPEN) this.kernel.learn(at, end - from, code);
  }

  private fill(from: number): void {
    const { window, bytes } = this;
    this.base = from;
    this.filled = Math.min(window.length, bytes.length - from);
    window.set(bytes.subarray(from, from + this.filled));
  }
}

let shared: PlainIndex | null | undefined;

/** The program's own; null where the kernel was not built, as when its sources are run. */
export function plainIndex(): PlainIndex | null {
  if (shared === undefined) {
    const path = fileURLToPath(new URL('./plain-index.wasm', import.meta.url));
    shared = existsSync(path) ? new PlainIndex(readFileSync(path)) : null;
  }
  return shared;
}
