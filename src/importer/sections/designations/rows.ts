/** Sizes of one family: lengths in metres, in the order that the family's table says. */
export type Rows = ReadonlyMap<string, readonly number[]>;

const MILLIMETRE = 1e-3;
const INCH = 0.0254;

/** A table of lines `size length length ...` in millimetres. */
export const inMillimetreRows = (table: string): Rows => readRows(table, MILLIMETRE);

/** A table of lines `size length length ...` in inches. */
export const inInchRows = (table: string): Rows => readRows(table, INCH);

function readRows(table: string, unit: number): Rows {
  const lines = table.trim().split('\n');
  return new Map(
    lines.map((line) => {
      const [size, ...lengths] = line.trim().split(/\s+/);
      return [size!, lengths.map((length) => Number(length) * unit)];
    }),
  );
}
