/** The two faces that sheets are set in. They have every sign the sheets need: µ Ω ≤ ± → ° ⌀. */
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** Path of a font file: beside the program once it is bundled, else in the package that brings it. */
function find(name: string): string {
  const beside = fileURLToPath(new URL(`./${name}.ttf`, import.meta.url));
  if (existsSync(beside)) return beside;
  const packaged = createRequire(import.meta.url).resolve('dejavu-fonts-ttf/package.json');
  return join(dirname(packaged), 'ttf', `${name}.ttf`);
}

export const fontFiles = (): { plain: string; bold: string } => ({
  plain: find('DejaVuSans'),
  bold: find('DejaVuSans-Bold'),
});
