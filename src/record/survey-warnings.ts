/** Where the figures of a measured coil leave the domain of a formula, and what else a person should know of them. */
import type { Coil } from '../coil/coil.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { CoilFile } from '../job/coil/file.ts';
import { HIGHEST_KHZ, LOWEST_KHZ } from '../job/coil/schema.ts';
import { selfCapacitanceValid } from '../physics/medhurst.ts';
import { ringsValid } from '../physics/ring-sum.ts';
import { frequencyText, lengthText, percentText, tidy } from '../quantity/format.ts';
import type { Figures } from './figures.ts';
import type { CoilRecord } from './schema.ts';
import { steepText } from './warnings.ts';

type Warning = CoilRecord['warnings'][number];

/** Beyond this part of a wavelength of wire the current is not even along it; half a percent of the reactance at a tenth. */
const WAVE_SHARE = 0.1;
const LIGHT_M_KHZ = 299_792.458;
/** The ring sum counts a wire thinner than this part of the diameter to 0.1 %. */
const THICK = 0.1;
/** The field solution was tried against finite elements up to here. */
const TIGHT = 0.95;

export function surveyWarnings(file: CoilFile, coil: Coil, working: WorkingCoil, figures: Figures): Warning[] {
  const { wire, sections } = file.coil;
  const list: Warning[] = [];
  const add = (code: string, text: string) => list.push({ code, text });
  const spans = figures.taps.map(({ range }) => range);
  const fastest = Math.max(...figures.taps.map((tap) => Math.max(tap.working.frequencyKhz, tap.range?.highKhz ?? 0)));
  const slowest = Math.min(...figures.taps.map((tap) => Math.min(tap.working.frequencyKhz, tap.range?.lowKhz ?? 1e9)));
  const wireM = coil.wireM(coil.turns);
  const share = Math.max(
    ...figures.taps.map((tap, i) => {
      const kHz = Math.max(tap.working.frequencyKhz, tap.range?.highKhz ?? 0);
      return (coil.wireM(file.coil.taps[i]!) * kHz) / LIGHT_M_KHZ;
    }),
  );
  if (share > WAVE_SHARE)
    add(
      'wire-near-wavelength',
      `The wire in use is up to ${percentText(share)} of a wavelength (${tidy(wireM, 3)} m in the whole coil): the current is no longer even along it, and Q and ranges there are too favourable.`,
    );
  if (fastest > HIGHEST_KHZ || slowest < LOWEST_KHZ)
    add(
      'frequency-outside',
      `Figures reach from ${frequencyText(slowest)} to ${frequencyText(fastest)}; they were tried between ${frequencyText(LOWEST_KHZ)} and ${frequencyText(HIGHEST_KHZ)}.`,
    );
  const ratio = coil.woundMm(coil.turns) / file.coil.meanDiameterMm;
  if (!selfCapacitanceValid(ratio))
    add(
      'self-capacitance-outside-table',
      `Length over diameter is ${ratio.toFixed(2)}; Medhurst’s table of self-capacitance runs from 0.1 to 50, its end value is used.`,
    );
  if (wire.bareMm / file.coil.meanDiameterMm > THICK)
    add(
      'wire-thick-for-former',
      `Wire of ${lengthText(wire.bareMm, 3)} on a diameter of ${lengthText(file.coil.meanDiameterMm)}: thicker than a tenth of it, inductance may be off by a percent.`,
    );
  const widest = Math.max(...sections.map(({ pitchMm }) => pitchMm));
  if (!ringsValid(widest / 1e3, file.coil.meanDiameterMm / 1e3))
    add('turns-steep', steepText(lengthText(widest, 4), lengthText(file.coil.meanDiameterMm)));
  const narrowest = Math.min(...sections.map(({ pitchMm }) => pitchMm));
  if (wire.strands === 1 && wire.bareMm / narrowest > TIGHT)
    add(
      'turns-nearly-touch',
      `Copper takes ${percentText(wire.bareMm / narrowest)} of the pitch; the resistance was tried up to ${percentText(TIGHT)} and is less sure here.`,
    );
  if (narrowest < wire.overallMm * 0.999)
    add(
      'pitch-below-covering',
      `The pitch of ${lengthText(narrowest, 4)} is less than the wire over its covering, ${lengthText(wire.overallMm, 3)}: taken as measured, the covering gives way or a measure is a little off.`,
    );
  if (wire.bareMm < 0.05 || wire.bareMm > 3)
    add('wire-outside', `Wire of ${lengthText(wire.bareMm, 3)}: the field solution was tried from 0.05 mm to 3 mm.`);
  if (!working.lossValid(fastest))
    add(
      'strands-thick',
      `Strands of ${wire.strandMm} mm are thicker than 1.5 skin depths at ${frequencyText(fastest)}: the loss of litz is overstated there.`,
    );
  if (/estimated|memory/i.test(wire.status))
    add('wire-table-status', `Diameters of ${wire.name}: ${wire.status}. Measure the wire itself.`);
  const band = file.band;
  if (band !== null && spans.every((span) => span !== null)) {
    const reach = { low: Math.min(...spans.map((s) => s.lowKhz)), high: Math.max(...spans.map((s) => s.highKhz)) };
    if (reach.low > band.lowKhz || reach.high < band.highKhz)
      add(
        'band-not-covered',
        `The positions tune ${frequencyText(reach.low)} to ${frequencyText(reach.high)}; the band is ${frequencyText(band.lowKhz)} to ${frequencyText(band.highKhz)}.`,
      );
  }
  const gaps = figures.coverage?.gaps ?? [];
  if (gaps.length > 0) {
    const each = gaps.map(
      ({ from, to, lowKhz, highKhz, tapsToClose }) =>
        `${frequencyText(lowKhz)} to ${frequencyText(highKhz)} between positions ${from} and ${to} (${tapsToClose} more ${tapsToClose === 1 ? 'tap closes' : 'taps close'} that)`,
    );
    add('gap-between-positions', `Nothing tunes ${each.join(', ')}.`);
  }
  const dead = figures.coverage?.deadEnds ?? [];
  if (dead.length > 0)
    add(
      'dead-end-resonance',
      `Dead turns resonate within reach of what the switch tunes at ${dead.map((one) => `position ${one.tap} (from ${frequencyText(one.secondKhz)})`).join(', ')}: strong signals there come through, and the tuning may jump.`,
    );
  return list;
}
