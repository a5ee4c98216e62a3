// npm run check:outside: what other people's programs say of our files. A program that is not there is skipped and named.
// With --quick only the parts of one starter job are sliced, which is most of the time.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { outcomesOf, tally } from '../random/runner.mjs';
import { checkNetlist } from './ngspice.mjs';
import { measureRulers, pagesOf } from './rulers.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const program = join(root, 'dist', 'coilwright.js');
const jobs = join(root, 'templates', 'jobs');
const work = mkdtempSync(join(tmpdir(), 'coilwright-outside-'));
let passed = 0;
let failed = 0;
const skipped = new Set();

const quick = process.argv.includes('--quick');
const run = (command, args) => spawnSync(command, args, { encoding: 'utf8', maxBuffer: 1 << 26 });
const has = (command) => {
  const there = !spawnSync(command, ['--version']).error;
  if (!there) skipped.add(command);
  return there;
};
function check(what, good, said) {
  if (good) passed++;
  else {
    failed++;
    console.log(`FAILED ${what}\n${said}`);
  }
}

function pdf(path, record) {
  if (has('qpdf')) {
    const { status, stdout, stderr } = run('qpdf', ['--check', path]);
    check(`qpdf --check ${path}`, status === 0, stdout + stderr);
  }
  if (has('pdftotext')) {
    const { stdout } = run('pdftotext', ['-layout', path, '-']);
    check(
      `pdftotext ${path} shows the job's name`,
      stdout.replace(/\s+/g, ' ').includes(record.job),
      stdout.slice(0, 500),
    );
    check(`pdftotext ${path} shows the record's hash`, stdout.includes(record.hash.slice(0, 12)), stdout.slice(0, 500));
  }
  if (has('pdffonts')) {
    const { stdout } = run('pdffonts', [path]);
    const rows = stdout.trim().split('\n').slice(2);
    check(
      `pdffonts ${path}: every font embedded`,
      rows.length > 0 && rows.every((row) => / yes +yes /.test(row)),
      stdout,
    );
  }
}

let rulers = 0;
let worstRuler = 0;
/** Every page at true scale, measured as it is rendered. */
function trueScale(path, { paper }) {
  if (!has('pdftoppm')) return;
  for (let page = 1; page <= pagesOf(path); page++)
    for (const [axis, mm] of Object.entries(measureRulers(path, page))) {
      // What a print may be off; a dot is 0.042 mm.
      const what = `${path}: the ruler ${axis} on page ${page}, ${paper}, is 100 mm`;
      check(what, mm !== null && Math.abs(mm - 100) < 0.1, `${mm} mm`);
      rulers++;
      worstRuler = Math.max(worstRuler, Math.abs((mm ?? 0) - 100));
    }
}

let slices = 0;
function stl(path, record, sliced) {
  if (has('admesh')) {
    const { status, stdout } = run('admesh', [path]);
    const zero = [
      'Total disconnected facets',
      'Degenerate facets',
      'Edges fixed',
      'Facets removed',
      'Facets added',
      'Facets reversed',
      'Backwards edges',
    ];
    for (const what of zero) {
      const count = [...stdout.matchAll(new RegExp(`${what}\\s*:\\s*(\\d+)(?:\\s+(\\d+))?`, 'g'))].flatMap((m) => [
        m[1],
        m[2],
      ]);
      const good = status === 0 && count.length > 0 && count.every((n) => n === undefined || n === '0');
      check(`admesh ${path}: ${what} 0`, good, stdout);
    }
    check(`admesh ${path}: one part`, /Number of parts\s*:\s*1\b/.test(stdout), stdout);
  }
  if (has('prusa-slicer')) {
    manifold(path);
    if (sliced) slice(path, record);
  }
}

function manifold(path) {
  const { stdout } = run('prusa-slicer', ['--info', path]);
  const good = /manifold = yes/.test(stdout) && !/repair|open_edges|degenerate|facets_removed/i.test(stdout);
  check(`prusa-slicer --info ${path}: manifold, nothing repaired`, good, stdout);
}

/** Slices without support. The slicer says so when something would be printed in the air. */
function slice(path, { printer }) {
  const { status, stdout, stderr } = run('prusa-slicer', [
    '--export-gcode',
    ...['--nozzle-diameter', printer.nozzleMm, '--layer-height', printer.layerMm].map(String),
    ...['--first-layer-height', String(printer.layerMm)],
    ...[
      '--bed-shape',
      [
        [0, 0],
        [printer.bedXMm, 0],
        [printer.bedXMm, printer.bedYMm],
        [0, printer.bedYMm],
      ]
        .map((p) => p.join('x'))
        .join(','),
    ],
    ...['--max-print-height', String(printer.heightMm)],
    ...['--output', join(work, 'part.gcode'), path],
  ]);
  const said = stdout + stderr;
  const good =
    status === 0 &&
    /exported to/.test(said) &&
    !/repaired|stability issues|floating|empty layer|warning|error/i.test(said);
  check(`prusa-slicer slices ${path}`, good, said);
  slices++;
}

function threemf(path, record) {
  const { status, stderr } = run('unzip', ['-tq', path]);
  if (has('unzip')) check(`unzip -t ${path}`, status === 0, stderr);
  if (!has('prusa-slicer')) return;
  manifold(path);
  const { stdout } = run('prusa-slicer', ['--info', path]);
  const bed = record.beds.find((one) => path.endsWith(one.path));
  const items = bed.items.length;
  check(`prusa-slicer --info ${path}: ${items} objects`, stdout.split('size_x').length - 1 >= 1, stdout);
  const most = (axis) =>
    Math.max(...[...stdout.matchAll(new RegExp(`max_${axis} = ([\\d.]+)`, 'g'))].map((m) => Number(m[1])));
  check(
    `prusa-slicer --info ${path}: inside the bed`,
    most('x') <= record.printer.bedXMm && most('y') <= record.printer.bedYMm && most('z') <= record.printer.heightMm,
    stdout,
  );
}

function svg(path) {
  if (has('rsvg-convert')) {
    const { status, stderr } = run('rsvg-convert', ['--output', join(work, 'pattern.png'), path]);
    check(`rsvg-convert ${path}`, status === 0 && stderr === '', stderr);
  }
  if (has('inkscape')) {
    const { status, stderr } = run('inkscape', [`--export-filename=${join(work, 'pattern.pdf')}`, path]);
    check(`inkscape ${path}`, status === 0, stderr);
  }
  if (has('xmllint')) {
    const { status, stderr } = run('xmllint', ['--noout', '--nonet', path]);
    check(`xmllint ${path}`, status === 0, stderr);
  }
}

let resonances = 0;
let worstResonance = 0;
function netlist(path, record) {
  if (!has('ngspice')) return;
  const simulate = (file) => {
    const { stdout, stderr } = run('ngspice', ['-b', file]);
    return stdout + stderr;
  };
  const count = (...one) => {
    resonances++;
    check(...one);
  };
  worstResonance = Math.max(worstResonance, checkNetlist(path, record, simulate, count));
}

/** The netlist of the set as it is written: its peak is a row of the table, as near as a circuit of that Q tells. */
function setNetlist(path, record) {
  if (!has('ngspice')) return;
  const { stdout, stderr } = run('ngspice', ['-b', path]);
  const peak = Number(/^resonance\s*=\s*([\d.e+-]+)/m.exec(stdout)?.[1]) / 1e3;
  const rows = record.around.pairs.flatMap((pair) => pair.rows);
  const good = rows.length === 0 ? peak > 0 : rows.some(({ kHz, q }) => Math.abs(peak / kHz - 1) < 1e-3 + 1 / q ** 2);
  check(`ngspice -b ${path}: the peak is a row of the table`, good, `${peak} kHz\n${stdout}${stderr}`);
}

/** Sets around starters and around random coils, each at several positions, contacts and frequencies of its table. */
async function arrangements(all) {
  if (!has('ngspice')) return;
  // The sweep of every row of a starter takes as long as a few random sets.
  const starters = quick ? all.filter((name) => name.startsWith('coupled')) : all;
  const wanted = quick ? 2 : 50;
  const made = (outcomes) => outcomes.filter(({ result }) => result !== 'refused').length;
  for (const [of, name, options] of [
    [
      'starters',
      'around-starters',
      {
        most: starters.length - 1,
        enough: (outcomes) => outcomes.length >= starters.length,
        order: (seed) => `${seed}:${join(jobs, starters[seed - 1])}`,
        size: 1,
      },
    ],
    ['random sets', 'around', { most: 20 * wanted, enough: (outcomes) => made(outcomes) >= wanted, size: 4 }],
  ]) {
    const { outcomes } = await outcomesOf({ name, entry: 'around-batch.ts', first: 1, fresh: true, ...options });
    const counted = outcomes.filter(({ result }) => result !== 'refused');
    for (const { seed, result, said } of counted)
      check(`ngspice: ${of}, seed ${seed}, as the table`, result === 'made', said.join('\n'));
    const least = of === 'starters' ? starters.length : wanted;
    check(
      `ngspice: ${least} ${of} were made`,
      counted.length >= least,
      JSON.stringify(outcomes.map(({ said }) => said)),
    );
    const looks = counted.flatMap((one) => one.looks);
    const figures = (key, from) => from.map((look) => look[key]).filter((value) => value !== null);
    const worst = (key, from = looks) => `${(100 * Math.max(0, ...figures(key, from))).toFixed(4)} %`;
    const sharp = looks.filter(({ q }) => q > 50);
    console.log(
      `ngspice, ${of}: ${counted.length} (${outcomes.length - counted.length} refused), ${looks.length} looks; worst resonance ` +
        `${worst('resonance')}, width ${worst('width')}, against the row ${worst('rowWidth')}; ${figures('peak', looks).length} peaks at the ` +
        `detector ${worst('peak')}, ${figures('peakWidth', looks).length} widths ${worst('peakWidth')}, gain ${worst('gain')}; of ` +
        `${sharp.length} with Q above 50 peak against the table ${worst('pulled', sharp)}, width ${worst('pulledWidth', sharp)}`,
    );
    console.log(`  ${tally(counted.map(({ kinds }) => kinds))}`);
  }
}

/** A tube whose template takes several pages: each of them has its rulers. */
function tiled() {
  const [job, out] = [join(work, 'tiled.json'), join(work, 'tiled')];
  const former = { kind: 'tube', 'outside-diameter': '130 mm', longest: '330 mm' };
  const wanted = { want: { inductance: ['30 uH', '300 uH'] }, wire: ['18 AWG enamel'], winding: { pitch: 'spaced' } };
  writeFileSync(
    job,
    JSON.stringify({ job: 'Tiled', former, ...wanted, paper: 'Letter', units: 'both', parts: ['coupon'] }),
  );
  const { status, stderr } = run(process.execPath, [program, 'plan', job, '--out', out]);
  check('plan a wide tube', status === 0, stderr);
  if (status !== 0) return;
  const path = join(out, 'wrap-template.pdf');
  if (has('pdfinfo')) check('the template of a wide tube takes several pages', pagesOf(path) > 1, path);
  trueScale(path, JSON.parse(readFileSync(join(out, 'plan.json'), 'utf8')));
}

/** The bench page, driven in a browser by tests of their own. */
function benchPage() {
  if (!has('/usr/bin/chromium')) return;
  const vitest = join(root, 'node_modules', 'vitest', 'vitest.mjs');
  const args = ['run', '--config', 'tests/vitest.config.ts', 'tests/bench-page/browser.test.ts'];
  const { status, stdout, stderr } = spawnSync(process.execPath, [vitest, ...args], {
    cwd: root,
    encoding: 'utf8',
    env: { ...process.env, DRIVE_BENCH_PAGE: '1', NO_COLOR: '1' },
  });
  check('the bench page in a browser', status === 0 && /Tests\s+\d+ passed/.test(stdout), stdout + stderr);
  for (const line of stdout.split('\n').filter((text) => /^bench page: \d/.test(text))) console.log(line);
}

try {
  benchPage();
  const starters = readdirSync(jobs).filter((name) => name.endsWith('.yaml'));
  for (const name of starters) {
    // Ranges need a set: a starter without one is planned a second time with it, for its netlist.
    const text = readFileSync(join(jobs, name), 'utf8');
    if (!/^set:/m.test(text) && has('ngspice')) {
      const [job, out] = [join(work, name), join(work, `${basename(name, '.yaml')}-with-set`)];
      writeFileSync(job, `${text}\nset: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, switch: open }\n`);
      const { status, stderr } = run(process.execPath, [program, 'plan', job, '--out', out]);
      check(`plan ${name} with a set`, status === 0, stderr);
      if (status === 0) netlist(join(out, 'coil.cir'), JSON.parse(readFileSync(join(out, 'plan.json'), 'utf8')));
    }
    const out = join(work, basename(name, '.yaml'));
    const { status, stderr } = run(process.execPath, [program, 'plan', join(jobs, name), '--out', out]);
    check(`plan ${name}`, status === 0, stderr);
    if (status !== 0) continue;
    const record = JSON.parse(readFileSync(join(out, 'plan.json'), 'utf8'));
    check(`plan ${name}: a hole pattern`, record.files.filter(({ kind }) => kind === 'svg').length === 1, out);
    const netlists = record.files.filter(({ kind }) => kind === 'netlist').map(({ path }) => path);
    const wanted = record.around === undefined ? ['coil.cir'] : ['coil.cir', 'set.cir'];
    check(`plan ${name}: ${wanted.join(' and ')}`, netlists.join() === wanted.join(), netlists.join());
    for (const file of record.files) {
      if (file.kind === 'pdf') pdf(join(out, file.path), record);
      if (file.path === 'wrap-template.pdf') trueScale(join(out, file.path), record);
      if (file.kind === 'stl') stl(join(out, file.path), record, !quick || name === starters[0]);
      if (file.kind === '3mf') threemf(join(out, file.path), record);
      if (file.kind === 'svg') svg(join(out, file.path));
      if (file.path === 'coil.cir') netlist(join(out, file.path), record);
      if (file.path === 'set.cir') setNetlist(join(out, file.path), record);
    }
  }
  check('there are starter jobs', starters.length > 0, jobs);
  tiled();
  await arrangements(starters);
} finally {
  rmSync(work, { recursive: true, force: true });
}
if (skipped.size > 0) console.log(`skipped, not installed: ${[...skipped].join(', ')}`);
if (resonances > 0) console.log(`ngspice: ${resonances} runs, worst ${(worstResonance * 100).toFixed(4)} % off`);
if (rulers > 0) console.log(`rulers of 100 mm, rendered: ${rulers}, worst ${worstRuler.toFixed(3)} mm off`);
if (slices > 0) console.log(`sliced without support or repair: ${slices} parts`);
console.log(`outside checks: ${passed} good, ${failed} bad`);
if (failed > 0 || passed === 0) process.exit(1);
