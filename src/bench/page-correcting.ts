/** Correction while winding: takes a length, works out what it changes, and moves the stops when that is wanted. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { figures, signed } from '../quantity/decimals.ts';
import { lengthText, unitsOf, wireText } from '../quantity/written.ts';
import type { CorrectedStop, Correction, LengthMeasure, LengthOver, Progress } from './api.ts';
import { correct, measurable, placesOf } from './correction.ts';
import { plannedAgain, turnOf } from './counter.ts';
import { type ShownCorrection, showCorrection, showCorrectionLabel } from './page-correction.ts';
import { byId, setText } from './page-dom.ts';
import { positive } from './page-number.ts';
import type { App } from './page-session.ts';
import { nameOf, turnsText } from './page-words.ts';

/** Half width of a reading off a rule, mm. */
const RULE_MM = 0.1;
const MM_PER_INCH = 25.4;

export interface CorrectingPart {
  readonly show: () => void;
}

export function correctionPart(app: App, moved: () => void): CorrectingPart {
  const { record } = app;
  const units = unitsOf(record);
  const words = BENCH.correction;
  const inch = units === 'inch';
  const blank = byId<HTMLInputElement>('wound');
  const over = byId<HTMLSelectElement>('over');
  const progress = () => app.session().progress;
  /** Worked out and not in use yet. */
  let draft: readonly LengthMeasure[] | null = null;

  const way = () => over.value as LengthOver;
  const turnNow = () => {
    const turn = turnOf(app.stops(), progress().count);
    return way() === 'wires' ? Math.floor(turn + 1e-6) : turn;
  };
  const worked = (measures: readonly LengthMeasure[]): Correction =>
    correct(record, { measures, count: progress().count, stops: app.stops() });
  const put = (change: Partial<Progress>) => app.keep({ progress: { ...progress(), ...change } });

  const shown = (correction: Correction, inUse: boolean): ShownCorrection => {
    const mm = (value: number, digits = 2) => lengthText(value, units, { digits });
    const whole = correction.stops.at(-1);
    const doubts = correction.lengths.flatMap(({ measure, plannedMm, doubt, offTurns }) => {
      const told = words.length(turnsText(measure.turn), mm(measure.lengthMm, 1), mm(plannedMm, 1));
      return doubt === null ? [told] : [told, words.doubt[doubt](turnsText(Math.abs(offTurns)))];
    });
    return {
      lines: [
        ...doubts,
        words.pitch(mm(correction.pitchMm, 3), mm(correction.plannedPitchMm, 3)),
        ...(correction.lacksMm > 0 ? [words.lacks(mm(correction.lacksMm, 1))] : []),
        ...(whole === undefined ? [] : [wholeText(correction, whole, mm)]),
      ],
      doubtful: correction.lengths.some(({ doubt }) => doubt !== null),
      taps: correction.stops
        .filter(({ kind }) => kind !== 'check')
        .map((stop) => ({
          name: nameOf(stop),
          planned: turnsText(stop.plannedTurn),
          now: words.place(turnsText(stop.turn), stop.angleDeg.toFixed(0)),
          inductance: figures(stop.inductanceUh),
          off: stop.deviationPercent === null ? '' : signed(stop.deviationPercent, 2),
          note: noteOf(stop, mm),
        })),
      inUse,
    };
  };
  const wholeText = (correction: Correction, stop: CorrectedStop, mm: (value: number, digits?: number) => string) =>
    words.whole(
      turnsText(correction.turns),
      mm(correction.windingLengthMm, 1),
      wireText(correction.wireLengthM, units),
      figures(stop.inductanceUh),
      stop.deviationPercent === null ? '' : signed(stop.deviationPercent, 2),
      `${figures(stop.lowUh)} – ${figures(stop.highUh)}`,
    );
  const noteOf = (stop: CorrectedStop, mm: (value: number, digits?: number) => string): string => {
    const notes: string[] = [words.placing[stop.placing]];
    if (stop.hole !== null && Math.abs(stop.hole.offMm) >= 0.05)
      notes.push(words.hole(stop.hole.label, mm(Math.abs(stop.hole.offMm), 1), stop.hole.offMm > 0));
    if (stop.backTurns > 0) notes.push(words.back(turnsText(stop.backTurns)));
    return notes.filter((note) => note !== '').join('; ');
  };

  const render = () => {
    const { measures } = progress();
    const some = draft ?? measures;
    const work = {
      use: () => {
        if (draft === null) return;
        put({ places: placesOf(record, worked(draft)), measures: draft });
        draft = null;
        moved();
        byId('correction-head').focus();
      },
      drop: () => {
        if (draft === null)
          put({ places: plannedAgain(app.stops(), progress().count, progress().places), measures: [] });
        draft = null;
        moved();
        byId('correction-head').focus();
      },
    };
    showCorrection(some.length === 0 ? null : shown(worked(some), draft === null), work);
  };

  const show = () => {
    const turn = turnNow();
    const ready = measurable(turn, way());
    showCorrectionLabel(words.wound[way()](turnsText(turn), inch ? 'in' : 'mm'), ready);
    setText(byId('correction-not'), ready ? '' : words.notYetWound[way()]);
    // What was worked out holds for the turns it was worked out at.
    if (draft !== null && draft.at(-1)!.turn !== turn && draft.at(-1)!.over === way()) draft = null;
    render();
  };

  over.addEventListener('change', show);
  byId('correction').addEventListener('submit', (event) => {
    event.preventDefault();
    const value = positive(blank.value);
    const turn = turnNow();
    setText(byId('correction-fault'), value === null ? words.fault(blank.value.trim()) : '');
    blank.toggleAttribute('aria-invalid', value === null);
    if (value === null || !measurable(turn, way())) return;
    const measure: LengthMeasure = {
      turn,
      lengthMm: inch ? value * MM_PER_INCH : value,
      halfMm: RULE_MM,
      over: way(),
    };
    draft = [...progress().measures.filter((one) => one.turn !== turn || one.over !== measure.over), measure];
    blank.value = '';
    render();
  });
  return { show };
}
