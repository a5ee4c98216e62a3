// One bundled build. Heavy libraries (PDF, kernel, units) end up in chunks of their own and load when asked for.
import { copyFile, mkdir, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const root = dirname(fileURLToPath(import.meta.url));
const require = createRequire(import.meta.url);
const dist = join(root, 'dist');

await rm(dist, { recursive: true, force: true });
await mkdir(dist, { recursive: true });
await build({
  absWorkingDir: root,
  entryPoints: { coilwright: 'cli/main.ts', worker: 'src/kernel/worker.ts' },
  outdir: dist,
  bundle: true,
  splitting: true,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  // Flat chunk names: the worker is found beside whichever chunk asks for it.
  chunkNames: '[name]-[hash]',
  minifySyntax: true,
  sourcemap: false,
  legalComments: 'none',
  loader: { '.yaml': 'text', '.md': 'text' },
  external: ['@jscad/stl-serializer'],
  banner: {
    js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);",
  },
  define: { 'process.env.COILWRIGHT_VERSION': JSON.stringify(require('./package.json').version) },
});

const fonts = dirname(require.resolve('dejavu-fonts-ttf/package.json'));
for (const font of ['DejaVuSans', 'DejaVuSans-Bold', 'DejaVuSansMono']) {
  await copyFile(join(fonts, 'ttf', `${font}.ttf`), join(dist, `${font}.ttf`));
}
await copyFile(require.resolve('manifold-3d/manifold.wasm'), join(dist, 'manifold.wasm'));
