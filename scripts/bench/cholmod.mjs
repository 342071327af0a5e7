// CHOLMOD as the other side of a race: a few lines of C compiled from the distribution's headers where there is a compiler.
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const COMPILER = process.env.CC ?? 'cc';
const SOURCE = fileURLToPath(new URL('./cholmod.c', import.meta.url));

/** Compiles the C side; null, with the reason said, where it cannot be. */
export function compileCholmod() {
  const folder = mkdtempSync(join(tmpdir(), 'pinwright-bench-'));
  const program = join(folder, 'cholmod');
  try {
    execFileSync(COMPILER, ['-O2', '-I/usr/include/suitesparse', '-o', program, SOURCE, '-lcholmod', '-lm'], {
      stdio: 'pipe',
    });
  } catch (error) {
    rmSync(folder, { recursive: true });
    console.log(
      `no CHOLMOD to compare with (a C compiler and libsuitesparse-dev are wanted): ${String(error.message).split('\n')[0]}`,
    );
    return null;
  }
  const file = join(folder, 'matrix');
  return {
    /** Least times of some rounds on `matrix`, in seconds: analyse, factorise, solve, all. */
    run(matrix, rounds) {
      writeFileSync(file, matrix);
      const answer = execFileSync(program, [file, String(rounds)], {
        env: { ...process.env, OPENBLAS_NUM_THREADS: '1', OMP_NUM_THREADS: '1' },
      });
      return JSON.parse(answer.toString());
    },
    close: () => rmSync(folder, { recursive: true }),
  };
}

/** The upper triangle of K in compressed columns and a right-hand side, as cholmod.c reads them. */
export function asColumns({ freedoms, rows, stiffness }, load) {
  const id = new Int32Array(freedoms.active.length).fill(-1);
  let n = 0;
  for (let u = 0; u < id.length; u++) if (freedoms.active[u]) id[u] = n++;
  const columns = Array.from({ length: n }, () => new Map());
  for (let row = 0; row < rows.count; row++)
    for (let p = rows.start[row]; p < rows.start[row + 1]; p++)
      for (let q = rows.start[row]; q < rows.start[row + 1]; q++) {
        const [i, j] = [id[rows.unknown[p]], id[rows.unknown[q]]];
        if (i > j) continue;
        columns[j].set(i, (columns[j].get(i) ?? 0) + stiffness[row] * rows.value[p] * rows.value[q]);
      }
  const entries = columns.reduce((sum, column) => sum + column.size, 0);
  const start = new Int32Array(n + 1);
  const index = new Int32Array(entries);
  const value = new Float64Array(entries);
  let k = 0;
  for (const [j, column] of columns.entries()) {
    for (const [i, v] of [...column].sort((a, b) => a[0] - b[0])) {
      index[k] = i;
      value[k++] = v;
    }
    start[j + 1] = k;
  }
  const right = Float64Array.from(load).filter((_, u) => freedoms.active[u]);
  return Buffer.concat([Int32Array.of(n, entries), start, index, value, right].map((a) => Buffer.from(a.buffer)));
}
