import type { Vec3 } from '../../domain/vector.ts';

/** One load of the brief: what it asks for, from areas, lengths and masses alone, and what the nodes got of it. */
export interface AskedLoad {
  readonly case: string;
  readonly line: number;
  /** "self weight x 1.1", "area load", "snow, half-left". */
  readonly what: string;
  /** N; null where no number can be told without the shares themselves. */
  readonly asked: Vec3 | null;
  readonly applied: Vec3;
}
