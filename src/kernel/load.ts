/** The boolean kernel, loaded once a process. Its WebAssembly file lies beside the bundle, or in the package when unbundled. */
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import type { ManifoldToplevel } from 'manifold-3d';
import Module from 'manifold-3d';

let loading: Promise<ManifoldToplevel> | null = null;

export function loadKernel(): Promise<ManifoldToplevel> {
  loading ??= instantiate();
  return loading;
}

async function instantiate(): Promise<ManifoldToplevel> {
  const beside = fileURLToPath(new URL('./manifold.wasm', import.meta.url));
  const wasm = existsSync(beside) ? beside : createRequire(import.meta.url).resolve('manifold-3d/manifold.wasm');
  const kernel = await Module({ locateFile: () => wasm });
  kernel.setup();
  return kernel;
}
