// Compiles src/step/plain-index.as.ts to WebAssembly: `node scripts/build-kernel.mjs OUT.wasm`.
import { fileURLToPath } from 'node:url';
import { main } from 'assemblyscript/asc';

const [out] = process.argv.slice(2);
const root = fileURLToPath(new URL('..', import.meta.url));
const options = ['-O3', '--noAssert', '--runtime', 'stub', '--enable', 'simd', '--baseDir', root];
const { error, stderr } = await main(['src/step/plain-index.as.ts', '-o', out, ...options]);
if (error) {
  console.error(stderr.toString());
  throw error;
}
