/** Readings: asked for, judged by the record's limits, kept, and saved as a file. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { fixed, signed } from '../quantity/decimals.ts';
import { unitsOf } from '../quantity/written.ts';
import type { Judgement, Question } from './api.ts';
import { judge, questionsOf } from './judge.ts';
import { byId, setText } from './page-dom.ts';
import { numberIn } from './page-number.ts';
import { type ReadingsTable, type ShownVerdict, saveText, showReadings } from './page-readings.ts';
import type { App } from './page-session.ts';
import { rowOf, toCsv } from './readings-csv.ts';

const MM_PER_INCH = 25.4;

export function readingsPart(app: App): void {
  const { record } = app;
  const words = BENCH.readings;
  const questions = new Map(questionsOf(record).map((question) => [question.key, question]));
  // Lengths are read in what the job's rules are marked in; the model and the file have millimetres.
  const inches = unitsOf(record) === 'inch';
  const inInches = (question: Question) => inches && question.unit === 'mm';
  const numberText = (question: Question, value: number | null) =>
    value === null
      ? words.none
      : inInches(question)
        ? fixed(value / MM_PER_INCH, question.digits + 2)
        : fixed(value, question.digits);

  const around = () => {
    const celsius = numberIn(app.session().celsius);
    return celsius === null ? {} : { celsius };
  };
  const readingOf = (question: Question): number | null => {
    const value = numberIn(app.session().readings[question.key] ?? '');
    return value === null ? null : inInches(question) ? value * MM_PER_INCH : value;
  };

  const verdictOf = (question: Question): ShownVerdict | null => {
    const text = app.session().readings[question.key]?.trim() ?? '';
    if (text === '') return null;
    const value = readingOf(question);
    if (value === null) return { good: null, word: words.noNumber(text), advice: [] };
    const judgement = judge(record, question, value, around());
    return { good: judgement.verdict === 'pass', word: verdictText(judgement), advice: judgement.advice };
  };
  const verdictText = ({ verdict, deviationPercent }: Judgement) => {
    const word = words.verdicts[verdict];
    return deviationPercent === null ? word : `${word}, ${signed(deviationPercent, 2)} %`;
  };

  const shown = (question: Question) => ({
    id: question.key,
    what: question.doubt === null ? question.what : `${question.what} (${words.doubts[question.doubt]})`,
    low: numberText(question, question.low),
    nominal: numberText(question, question.nominal),
    high: numberText(question, question.high),
    unit: inInches(question) ? 'in' : question.unit,
  });
  const taps = record.windings[0]!.taps.length;
  const all = [...questions.values()];
  const whole = (question: Question) => question.tap === null || question.tap === taps;
  const tables: ReadingsTable[] = [
    { caption: words.whole, open: true, readings: all.filter(whole).map(shown) },
    ...(Object.keys(words.byTap) as (keyof typeof words.byTap)[]).map((quantity) => ({
      caption: words.byTap[quantity],
      open: false,
      readings: all.filter((question) => !whole(question) && question.quantity === quantity).map(shown),
    })),
  ].filter(({ readings }) => readings.length > 0);
  const show = () =>
    showReadings(tables, {
      text: (id) => app.session().readings[id] ?? '',
      entered: (id, text) => {
        app.keep({ readings: { ...app.session().readings, [id]: text } });
        setText(byId('saved'), '');
      },
      judged: (id) => verdictOf(questions.get(id)!),
    });
  show();

  for (const [id, name] of [
    ['celsius', 'celsius'],
    ['wound-by', 'woundBy'],
    ['coil-no', 'coilNo'],
  ] as const) {
    const blank = byId<HTMLInputElement>(id);
    blank.value = app.session()[name];
    blank.addEventListener('input', () => app.keep({ [name]: blank.value }));
  }
  byId('celsius').addEventListener('change', show);

  byId('save').addEventListener('click', () => {
    const { coilNo, woundBy } = app.session();
    const rows = all.flatMap((question) => {
      const value = readingOf(question);
      if (value === null) return [];
      const judgement = judge(record, question, value, around());
      const remark = woundBy.trim() === '' ? '' : words.remark(woundBy.trim());
      return [rowOf(record, question, value, judgement, { serial: coilNo.trim(), ...around(), remark })];
    });
    if (rows.length === 0) {
      setText(byId('saved'), words.nothing);
      return;
    }
    const name = fileName(record.job, coilNo);
    saveText(name, toCsv(rows));
    setText(byId('saved'), words.saved(name));
  });
}

/** `readings-low-bench-receiver-7.csv`: what every system takes as a file's name. */
function fileName(job: string, coilNo: string): string {
  const plain = (text: string) =>
    text
      .normalize('NFKD')
      .toLowerCase()
      .replace(/[^a-z0-9]+/g, '-')
      .replace(/^-+|-+$/g, '')
      .slice(0, 60);
  return `${['readings', plain(job), plain(coilNo)].filter((part) => part !== '').join('-')}.csv`;
}
