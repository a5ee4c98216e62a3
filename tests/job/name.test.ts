import { join, resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readName, slug } from '../../src/job/name.ts';

describe('the folder name of a job', () => {
  it.each([
    ['Low bench receiver', 'low-bench-receiver'],
    ['Spule für Küche & Bad', 'spule-fur-kuche-bad'],
    ['Straße 5', 'strasse-5'],
    ['Ærø', 'aero'],
    ['  x  ', 'x'],
    ['../../etc/passwd', 'etc-passwd'],
    ['C:\\Windows\\x', 'c-windows-x'],
    ['.hidden', 'hidden'],
    ['a'.repeat(80), 'a'.repeat(60)],
    [`${'a'.repeat(59)} b`, 'a'.repeat(59)],
  ])('%s', (name, folder) => {
    expect(slug(name)).toBe(folder);
  });

  it.each(['..', '.', '/', '東京', 'CON', 'nul', 'Com1', 'LPT9', '---', '🙂'])(
    '%s gives a name made of its hash',
    (name) => {
      expect(slug(name)).toMatch(/^job-[0-9a-f]{8}$/);
    },
  );

  it('tells names apart that have no usable letter', () => {
    expect(slug('東京')).not.toBe(slug('京都'));
  });

  it('never leads out of the output folder, and is its own folder name', () => {
    let ran = 0;
    const piece = fc.constantFrom(
      '..',
      '/',
      '\\',
      '.',
      ' ',
      '-',
      'a',
      'ß',
      'É',
      '\u0000',
      'con',
      ':',
      '~',
      '\u202e',
      '1',
    );
    const name = fc.oneof(
      fc.string(),
      fc.string({ unit: 'grapheme' }),
      fc.array(piece).map((list) => list.join('')),
    );
    fc.assert(
      fc.property(name, (text) => {
        ran += 1;
        const folder = slug(text);
        expect(folder).toMatch(/^[a-z0-9](?:[a-z0-9-]{0,58}[a-z0-9])?$/);
        expect(resolve(join('/out', folder))).toBe(`/out/${folder}`);
        expect(slug(folder)).toBe(folder);
      }),
      { seed: 22, numRuns: 2000 },
    );
    console.log(`names turned into folders: ${ran}`);
    expect(ran).toBeGreaterThan(0);
  });

  it('is only asked for names of one visible line', () => {
    expect(readName(' Café ')).toEqual({ ok: true, value: 'Café' });
    for (const bad of ['', '  ', 'a\nb', 'a\u0000', '\u200b', '\ud800', 5, null, 'x'.repeat(81)])
      expect(readName(bad).ok).toBe(false);
  });
});
