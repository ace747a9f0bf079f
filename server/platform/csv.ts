import { stringify } from 'csv-stringify/sync';

/**
 * A table as CSV after RFC 4180, with a byte order mark so that spreadsheets read it as UTF-8. A cell that a spreadsheet would take
 * for a formula is led by an apostrophe.
 */
export function csvOf(header: string[], rows: (string | number)[][]): string {
  return stringify([header, ...rows.map((row) => row.map(harmless))], {
    bom: true,
    record_delimiter: '\r\n',
  });
}

const harmless = (cell: string | number): string | number =>
  typeof cell === 'string' && /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
