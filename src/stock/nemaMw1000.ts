/**
 * Film-insulated round copper wire in AWG sizes, thousandths of an inch (mil): limits of the bare wire, least increase and
 * greatest overall diameter of single and heavy build.
 *
 * Source: NEMA MW 1000. Status: bare limits, single build and the least increase of heavy build READ in a manufacturer's
 * page that quotes the standard; the greatest overall diameter of heavy build FROM MEMORY, single source, and known for
 * some sizes only. AWG 41 to 44 could not be verified and are left out, as are sizes too thick to be in stock.
 */
export const NEMA_STANDARD = 'NEMA MW 1000';

/** mm to the thousandth of an inch, exact. */
export const MM_PER_MIL = 0.0254;

/** One size; a figure that the table does not give is undefined. */
export interface NemaRow {
  readonly awg: number;
  readonly bareMinMil: number;
  readonly bareNominalMil: number;
  readonly bareMaxMil: number;
  readonly singleMinIncreaseMil: number | undefined;
  readonly singleMaxOverallMil: number | undefined;
  readonly heavyMinIncreaseMil: number;
  readonly heavyMaxOverallMil: number | undefined;
}

type Columns = readonly [
  awg: number,
  bareMin: number,
  bareNominal: number,
  bareMax: number,
  singleIncrease: number | undefined,
  singleMax: number | undefined,
  heavyIncrease: number,
  heavyMax: number | undefined,
];

const _ = undefined;
const TABLE: readonly Columns[] = [
  [9, 113.3, 114.4, 115, _, _, 3.2, 118.9],
  [10, 100.9, 101.9, 102.4, _, _, 3.1, _],
  [11, 89.8, 90.7, 91.2, _, _, 3, _],
  [12, 80, 80.8, 81.2, _, _, 2.9, _],
  [13, 71.3, 72, 72.4, _, _, 2.8, _],
  [14, 63.5, 64.1, 64.4, 1.6, 66.6, 3.2, 68.2],
  [15, 56.5, 57.1, 57.4, 1.5, 59.4, 3, _],
  [16, 50.3, 50.8, 51.1, 1.4, 53.1, 2.9, 54.5],
  [17, 44.8, 45.3, 45.5, 1.4, 47.5, 2.8, _],
  [18, 39.9, 40.3, 40.5, 1.3, 42.4, 2.6, 43.7],
  [19, 35.5, 35.9, 36.1, 1.2, 37.9, 2.5, _],
  [20, 31.7, 32, 32.2, 1.2, 33.9, 2.3, 35.1],
  [21, 28.2, 28.5, 28.6, 1.1, 30.3, 2.2, _],
  [22, 25, 25.3, 25.4, 1.1, 27, 2.1, 28.1],
  [23, 22.4, 22.6, 22.7, 1, 24.3, 2, _],
  [24, 19.9, 20.1, 20.2, 1, 21.7, 1.9, 22.7],
  [25, 17.7, 17.9, 18, 0.9, 19.4, 1.8, _],
  [26, 15.7, 15.9, 16, 0.9, 17.3, 1.7, 18.2],
  [27, 14.1, 14.2, 14.3, 0.8, 15.6, 1.6, _],
  [28, 12.5, 12.6, 12.7, 0.8, 14, 1.6, 14.7],
  [29, 11.2, 11.3, 11.4, 0.7, 12.6, 1.5, _],
  [30, 9.9, 10, 10.1, 0.7, 11.2, 1.4, 11.9],
  [31, 8.8, 8.9, 9, 0.6, 10, 1.3, _],
  [32, 7.9, 8, 8.1, 0.6, 9.1, 1.2, 9.8],
  [33, 7, 7.1, 7.2, 0.5, 8.1, 1.1, _],
  [34, 6.2, 6.3, 6.4, 0.5, 7.2, 1, 7.8],
  [35, 5.5, 5.6, 5.7, 0.4, 6.4, 0.9, _],
  [36, 4.9, 5, 5.1, 0.4, 5.8, 0.8, 6.3],
  [37, 4.4, 4.5, 4.6, 0.3, 5.2, 0.8, _],
  [38, 3.9, 4, 4.1, 0.3, 4.7, 0.7, 5.1],
  [39, 3.4, 3.5, 3.6, 0.2, 4.1, 0.6, _],
  [40, 3, 3.1, 3.2, 0.2, 3.7, 0.6, 4],
];

/** Every size by AWG number, thickest first. */
export const NEMA_ROWS: ReadonlyMap<number, NemaRow> = new Map(
  TABLE.map(([awg, bareMinMil, bareNominalMil, bareMaxMil, singleIncrease, singleMax, heavyIncrease, heavyMax]) => [
    awg,
    {
      awg,
      bareMinMil,
      bareNominalMil,
      bareMaxMil,
      singleMinIncreaseMil: singleIncrease,
      singleMaxOverallMil: singleMax,
      heavyMinIncreaseMil: heavyIncrease,
      heavyMaxOverallMil: heavyMax,
    },
  ]),
);

/**
 * Greatest overall diameter of heavy build, mil, and whether it had to be estimated: where the table is silent, the
 * room above the greatest bare wire is interpolated by gauge number between the nearest sizes that have a figure
 * (the tables hold both ends of the range, so that there always are two).
 */
export function heavyMaxOverallMil(row: NemaRow): { readonly mil: number; readonly estimated: boolean } {
  if (row.heavyMaxOverallMil !== undefined) return { mil: row.heavyMaxOverallMil, estimated: false };
  const known = [...NEMA_ROWS.values()].flatMap((other) =>
    other.heavyMaxOverallMil === undefined
      ? []
      : [{ awg: other.awg, room: other.heavyMaxOverallMil - other.bareMaxMil }],
  );
  const thicker = known.findLast((other) => other.awg < row.awg)!;
  const thinner = known.find((other) => other.awg > row.awg)!;
  const share = (row.awg - thicker.awg) / (thinner.awg - thicker.awg);
  return { mil: row.bareMaxMil + thicker.room + share * (thinner.room - thicker.room), estimated: true };
}
