import type { Ports } from '../../src/around/response.ts';
import { inverseOf } from '../../src/physics/circuit/complex.ts';

/**
 * Where the impedance at the hot end is greatest near a frequency with this capacitance there, and how wide it is at 0.707 of that, kHz:
 * nothing else connected, found by looking rather than by slopes.
 */
export function resonanceOf(ports: Ports, tuningPf: number, nearKhz: number): { kHz: number; widthKhz: number } | null {
  const size = (kHz: number) => {
    const omega = 2e3 * Math.PI * kHz;
    const { re, im, size: count } = ports.impedance(omega);
    const at = ports.at('hot')! * (count + 1);
    const { re: G, im: B } = inverseOf({ re: re[at]!, im: im[at]! });
    return 1 / Math.hypot(G, B + omega * tuningPf * 1e-12);
  };
  let centre = nearKhz;
  let step = nearKhz * 0.05;
  // Uphill from the nearest of a few places, then by the parabola through three.
  for (let i = -8; i <= 8; i++) if (size(nearKhz + i * step) > size(centre)) centre = nearKhz + i * step;
  while (step > nearKhz * 1e-7) {
    const [a, b, c] = [size(centre - step), size(centre), size(centre + step)];
    if (b >= a && b >= c) step /= 2;
    else centre += a > c ? -step : step;
  }
  const most = size(centre);
  if (!(most > 0)) return null;
  const edge = (way: 1 | -1) => {
    let far = nearKhz * 1e-4;
    while (size(centre + way * far) > most * Math.SQRT1_2) {
      far *= 1.5;
      if (far > 0.9 * centre) return null;
    }
    let [inside, outside] = [far / 1.5, far];
    if (far === nearKhz * 1e-4) inside = 0;
    for (let i = 0; i < 50; i++) {
      const middle = (inside + outside) / 2;
      if (size(centre + way * middle) > most * Math.SQRT1_2) inside = middle;
      else outside = middle;
    }
    return outside;
  };
  const [below, above] = [edge(-1), edge(1)];
  return below === null || above === null ? null : { kHz: centre, widthKhz: below + above };
}
