// The netlist of a record in a general circuit simulator: as written, and at every position with the capacitor out and in.
import { readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Relative. Grid of the sweep 5e-5, digits of the record 5e-5, losses below 1e-5 at these Q. */
const AGREES = 1e-3;

/** The block of another position active: asterisks moved as the notes in the file say. */
function moved(text, position) {
  let block = 0;
  const lines = text.split('\n').map((line) => {
    const begins = /^\* position (\d+)/.exec(line)?.[1];
    if (begins !== undefined) block = Number(begins);
    else if (line.startsWith('* end of positions')) block = 0;
    else if (block > 0) return (block === position ? '' : '*') + line.replace(/^\*/, '');
    return line;
  });
  return lines.join('\n');
}

const withParam = (text, name, value) =>
  text.replace(new RegExp(`^\\.param ${name}=.*$`, 'm'), `.param ${name}=${value}`);
const peakOf = (said) => Number(/^resonance\s*=\s*([\d.e+-]+)/m.exec(said)?.[1]);

/** `simulate(path)` answers with what ngspice says of a file; `check(what, good, said)` counts. Answers with the largest error. */
export function checkNetlist(path, record, simulate, check) {
  const text = readFileSync(path, 'utf8');
  const said = simulate(path);
  check(`ngspice -b ${path}: a resonance`, peakOf(said) > 0, said);
  const { capacitorLowPf, capacitorHighPf } = record.demand.set ?? {};
  let worst = 0;
  for (const { tap, range } of record.windings[0].taps) {
    if (range === null) continue;
    const shrinks = new RegExp(
      `^\\* position ${tap}:.*low \\S+ kHz shrink (\\S+), high \\S+ kHz shrink (\\S+)$`,
      'm',
    ).exec(text);
    for (const [kHz, shrink, pf] of [
      [range.lowKhz, shrinks?.[1], capacitorHighPf],
      [range.highKhz, shrinks?.[2], capacitorLowPf],
    ]) {
      // The record holds the mean of the two distributions of the self-capacitance, and half their difference.
      const half = kHz === range.lowKhz ? range.lowUncertaintyKhz : range.highUncertaintyKhz;
      const peaks = [0, 1].map((spread) => {
        const about = kHz + (spread === 0 ? half : -half);
        const values = { shrink, spread, ccap: pf * 1e-12 };
        const other = Object.entries(values).reduce(
          (all, [name, value]) => withParam(all, name, value),
          moved(text, tap),
        );
        // Wide enough to see a first resonance that is off, fine enough to see 1e-4.
        const sweep = `.ac lin 801 ${about * 960} ${about * 1040}`;
        const file = join(dirname(path), 'position.cir');
        writeFileSync(file, other.replace(/^\.ac .*$/m, sweep));
        return peakOf(simulate(file));
      });
      const off = Math.abs((peaks[0] + peaks[1]) / 2e3 / kHz - 1);
      worst = Math.max(worst, off);
      check(`ngspice ${path}: position ${tap}, ${pf} pF within 0.1 %`, off < AGREES, `${peaks} Hz against ${kHz} kHz`);
    }
  }
  return worst;
}
