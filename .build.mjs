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
  entryPoints: { coilwright: 'cli/main.ts', worker: 'src/kernel/worker.ts', planner: 'src/lot/planner.ts' },
  outdir: dist,
  bundle: true,
  splitting: true,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  // Flat chunk names: worker and planner are found beside whichever chunk asks for it.
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

// The bench page's side of the program: one script for browsers since 2020, put into each page with its style.
await build({
  absWorkingDir: root,
  entryPoints: { 'bench-page': 'src/bench/page-main.ts' },
  outdir: dist,
  bundle: true,
  minify: true,
  format: 'iife',
  platform: 'browser',
  target: 'es2020',
  charset: 'utf8',
  legalComments: 'none',
});
await build({
  absWorkingDir: root,
  entryPoints: { 'bench-page': 'templates/bench/page.css' },
  outdir: dist,
  bundle: true,
  minify: true,
  target: 'es2020',
});
await copyFile(join(root, 'templates/bench/page.html'), join(dist, 'bench-page.html'));

const fonts = dirname(require.resolve('dejavu-fonts-ttf/package.json'));
for (const font of ['DejaVuSans', 'DejaVuSans-Bold', 'DejaVuSansMono']) {
  await copyFile(join(fonts, 'ttf', `${font}.ttf`), join(dist, `${font}.ttf`));
}
await copyFile(require.resolve('manifold-3d/manifold.wasm'), join(dist, 'manifold.wasm'));
