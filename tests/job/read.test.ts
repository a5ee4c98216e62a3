import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readJob } from '../../src/job/read.ts';

const LEAST = `job: Low bench receiver
want:   { inductance: 20 uH to 240 uH, taps: 12, spacing: even ratio }
former: { outside-diameter: 76 mm, longest: 140 mm, kind: printed }
wire:   [ 24 AWG enamel, 0.5 mm enamel, 22 AWG double cotton, 20 x 0.1 mm litz single silk ]
`;
const BAND = `job: By its purpose
want:   { band: 530 kHz to 1700 kHz, overlap: 5 % }
set:    { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, switch: open }
`;

/** Keys whose default a starter shows behind a mark; the others have none, or one that depends on other keys. */
const SHOWN = new Set(
  'paper material mounting flanges hand earthed pitch tap-method tap-layout finish-trim prefer line layer hole-compensation'.split(
    ' ',
  ),
);

describe('a job', () => {
  it('reads the least there is', () => {
    const job = readJob(LEAST, 'job.yaml');
    expect(job.want).toEqual({ kind: 'range', lowUh: 20, highUh: 240, taps: 12, spacing: 'even ratio' });
    expect(job.former).toEqual({
      kind: 'printed',
      diametersMm: { listMm: [76] },
      longestMm: 140,
      body: 'full',
      ribs: null,
      screwMm: 4.4,
      screwCircleMm: null,
      wallMm: null,
      material: 'PLA',
      mounting: 'ears',
      flanges: true,
    });
    expect(job.wires === 'stock' ? [] : job.wires.map((wire) => wire.name)).toEqual([
      '24 AWG enamel',
      '0.5 mm enamel',
      '22 AWG double cotton',
      '20 x 0.1 mm litz single silk',
    ]);
    expect([job.name, job.set, job.date, job.atKhz]).toEqual(['Low bench receiver', null, null, null]);
  });

  it('keeps apart what was written and what was assumed', () => {
    const job = readJob(LEAST, 'job.yaml');
    expect(job.given).toEqual({
      job: 'Low bench receiver',
      'want.inductance': '20 uH to 240 uH',
      'want.taps': 12,
      'want.spacing': 'even ratio',
      'former.outside-diameter': '76 mm',
      'former.longest': '140 mm',
      'former.kind': 'printed',
      wire: ['24 AWG enamel', '0.5 mm enamel', '22 AWG double cotton', '20 x 0.1 mm litz single silk'],
    });
    expect(job.assumed).toEqual({
      paper: 'A4',
      prefer: 'least loss',
      temperature: '20 °C',
      'winding.hand': 'right',
      'winding.earthed': 'start',
      'winding.pitch': 'any',
      'winding.tap-method': 'auto',
      'winding.tap-layout': 'auto',
      'winding.finish-trim': true,
      'former.material': 'PLA',
      'former.mounting': 'ears',
      'former.flanges': true,
      'former.body': 'full',
      'former.screw': '4.4 mm',
      'printer.bed': '220 x 220 mm',
      'printer.height': '250 mm',
      'printer.nozzle': '0.4 mm',
      'printer.line': '0.45 mm',
      'printer.layer': '0.2 mm',
      'printer.hole-compensation': '0 mm',
      'printer.clearance': '0.3 mm',
      'printer.scale': '100 %',
      'printer.material': 'PLA',
      'shop.shaft': '8 mm',
      'shop.shaft-form': 'round',
      'shop.spool': '80 x 70 mm',
      'shop.spool-bore': '16 mm',
      'shop.meter': '100 kHz',
      'shop.meter-accuracy': '1 %',
      'shop.capacitor-tolerance': '1 %',
      'shop.capacitors': ['100 pF', '330 pF'],
      'shop.generator': '50 ohm',
      'shop.generator-coupling': '1 pF',
      'shop.probe-capacitance': '10 pF',
      'shop.probe-resistance': '10 Mohm',
      units: 'metric',
    });
  });

  it('reads a wish by its purpose', () => {
    const job = readJob(BAND, 'job.yaml');
    expect(job.want).toEqual({ kind: 'band', lowKhz: 530, highKhz: 1700, overlap: 0.05, taps: null });
    expect(job.set).toEqual({
      capacitorLowPf: 15,
      capacitorHighPf: 380,
      strayPf: 12,
      aerialPf: 60,
      switch: 'open',
      leadPf: 2,
    });
    expect([job.wires, job.former.diametersMm, job.former.longestMm]).toEqual([
      'stock',
      { lowMm: 50, highMm: 90 },
      250,
    ]);
  });

  it('takes the overlap as 5 % without taps and as 0 % with them', () => {
    const overlap = (want: string) => {
      const { want: read, assumed } = readJob(`job: x\nwant: ${want}\nset: { capacitor: 15 pF to 380 pF }`, 'x');
      return read.kind === 'band' ? [read.overlap, assumed['want.overlap']] : [];
    };
    expect(overlap('{ band: 530 to 1700 kHz }')).toEqual([0.05, '5 %']);
    expect(overlap('{ band: 530 to 1700 kHz, taps: 4 }')).toEqual([0, '0 %']);
    expect(overlap('{ band: 530 to 1700 kHz, taps: 4, overlap: 0.1 }')).toEqual([0.1, undefined]);
  });

  it('reads lists, one value, inches, a tube', () => {
    const list = (want: string) => readJob(`job: x\nwant: ${want}`, 'x').want;
    const wanted = { kind: 'list', inductancesUh: [20, 80, 240] };
    expect(list('{ inductance: [20 uH, 80 µH, 0.24 mH] }')).toEqual(wanted);
    expect(list('{ spacing: [20 uH, 80 uH, 240 uH], taps: 3 }')).toEqual(wanted);
    expect(list('{ inductance: 20 uH to 240 uH, taps: 3, spacing: [20 uH, 80 uH, 240 uH] }')).toEqual(wanted);
    expect(list('{ inductance: 240 uH }')).toEqual({ kind: 'list', inductancesUh: [240] });
    const tube = readJob(
      'job: x\nwant: { inductance: 240 uH }\nformer: { kind: tube, outside-diameter: [3 in, 2 3/4 in, 76.2 mm] }',
      'x',
    );
    expect(tube.former).toEqual({
      kind: 'tube',
      diametersMm: { listMm: [69.85, 76.2] },
      longestMm: 200,
      wallMm: 1.5,
      material: 'card',
      body: 'full',
      ribs: null,
      mounting: 'none',
      screwMm: null,
      screwCircleMm: null,
      flanges: false,
    });
  });

  it('says which covering it took when none was written', () => {
    expect(readJob('job: x\nwant: { inductance: 9 uH }\nwire: 24 AWG', 'x').assumed.wire).toBe('24 AWG enamel');
    const two = readJob('job: x\nwant: { inductance: 9 uH }\nwire: [26 AWG enamel, 24 AWG]', 'x');
    expect(two.assumed['wire[2]']).toBe('24 AWG enamel');
  });

  it('derives line and layer from the nozzle', () => {
    const { printer } = readJob(
      'job: x\nwant: { inductance: 9 uH }\nprinter: { nozzle: 0.6 mm, bed: 25 x 21 cm }',
      'x',
    );
    expect([printer.lineMm, printer.layerMm, printer.bedXMm, printer.bedYMm]).toEqual([0.675, 0.3, 250, 210]);
  });

  it('takes headings with nothing under them as left out', () => {
    const job = readJob('job: x\nwant: { inductance: 9 uH }\nset:\nformer:\nwinding:\n  # hand: left\nprinter:\n', 'x');
    expect([job.set, job.former.kind, job.winding.hand, job.printer.nozzleMm]).toEqual([null, 'printed', 'right', 0.4]);
  });

  it('is the same from JSON, with a mark in front, with other line ends, with $schema', () => {
    const job = readJob(LEAST, 'x');
    const json = JSON.stringify({
      $schema: './job.schema.json',
      job: 'Low bench receiver',
      want: { inductance: '20 uH to 240 uH', taps: 12, spacing: 'even ratio' },
      former: { 'outside-diameter': '76 mm', longest: '140 mm', kind: 'printed' },
      wire: ['24 AWG enamel', '0.5 mm enamel', '22 AWG double cotton', '20 x 0.1 mm litz single silk'],
    });
    expect(readJob(json, 'x')).toEqual({ ...job, source: expect.anything() });
    expect(readJob(JSON.stringify(JSON.parse(json), null, '\t'), 'x')).toEqual({ ...job, source: expect.anything() });
    expect(readJob(`\ufeff${LEAST}`, 'x')).toEqual({ ...job, source: expect.anything() });
    expect(readJob(LEAST.replaceAll('\n', '\r\n'), 'x')).toEqual({ ...job, source: expect.anything() });
    expect(readJob(`---\n${LEAST}...\n`, 'x')).toEqual({ ...job, source: expect.anything() });
  });

  it('is read from every starter', () => {
    const folder = new URL('../../templates/jobs/', import.meta.url);
    const names = readdirSync(folder).filter((name) => name.endsWith('.yaml'));
    const read = names.map((name) => {
      const job = readJob(readFileSync(new URL(name, folder), 'utf8'), name);
      return `${name}: ${job.want.kind}, ${job.former.kind}, ${job.winding.hand}`;
    });
    expect(read).toEqual([
      'coupled-aerial-receiver.yaml: range, printed, right',
      'cracked-form-replacement.yaml: list, tube, left',
      'forty-coil-lot.yaml: range, printed, right',
      'low-bench-receiver.yaml: band, printed, right',
    ]);
  });

  it('shows in every starter what would be taken anyway', () => {
    // A key behind a mark stands for its default: with the mark taken off nothing changes.
    const folder = new URL('../../templates/jobs/', import.meta.url);
    let tried = 0;
    for (const name of readdirSync(folder).filter((one) => one.endsWith('.yaml'))) {
      const text = readFileSync(new URL(name, folder), 'utf8');
      const plain = readJob(text, name);
      for (const [line, key] of text.matchAll(/^ *# ([a-z-]+): [^\n]*$/gm)) {
        if (key === undefined || !SHOWN.has(key)) continue;
        const changed = readJob(text.replace(line, line.replace('# ', '')), name);
        const bare = { given: {}, assumed: {}, source: plain.source };
        expect({ ...changed, ...bare }, `${name}: ${line}`).toEqual({ ...plain, ...bare });
        tried += 1;
      }
    }
    console.log(`defaults shown in starters, tried: ${tried}`);
    expect(tried).toBeGreaterThan(20);
  });
});
