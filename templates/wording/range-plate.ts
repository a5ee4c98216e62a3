/** The fixed words of the range plate. */

export const PLATE = {
  document: 'Range plate',
  part: 'true scale 1:1',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  print: 'Print at 100 %, no scaling. First measure the ruler (100 mm) and the square (50 mm).',
  cut: (hole: string) =>
    `Cut along the outer circle and out of the small one, which is ${hole} for the bush; for another bush the cross tells the middle. It goes under the knob, numbers to the front.`,
  angle: (name: string, step: string) => `${name}: ${step}° from one position to the next, numbers clockwise.`,
  check:
    'Hold the switch against the marks before you cut: makers differ in the angle, and the pointer must meet every mark. A dial scale for the capacitor is made later, from readings.',
  ranges: 'At each position: what it tunes, in kHz.',
  inductances: 'At each position: its low-frequency inductance, in µH; the record holds no set.',
  tensRanges: 'Tens: what a contact tunes with all the units.',
  tensInductances: 'Tens: inductance with the last unit and with unit 0, in µH.',
  listed: 'There is no room for them on the plate: they are listed on the next sheet.',
  single: 'Switch',
  tens: 'Tens switch',
  units: 'Units switch',
  kHz: 'kHz',
  uH: 'µH',
  named: (name: string, unit: string) => [name, unit].filter((one) => one !== '').join(', '),
  onPlate: { tens: 'tens', units: 'units' },
  between: (low: string, high: string) => `${low}–${high}`,
  list: (name: string) => `${name}: what does not go on the plate`,
  listMore: (name: string) => `${name}, continued`,
  position: 'position',
  unit: 'mm',
  square: [
    'check square',
    'from the left edge of the',
    'left line to the left edge',
    'of the right line: 50 mm;',
    'bottom to top likewise',
  ],
} as const;
