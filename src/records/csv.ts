/** Comma-separated values by RFC 4180: reading what spreadsheets save, and writing what they open. */

export type CsvRead =
  | { readonly ok: true; readonly records: readonly (readonly string[])[] }
  /** `row` counts records from 1, as a spreadsheet shows them */
  | { readonly ok: false; readonly row: number; readonly problem: string };

const BYTE_ORDER_MARK = '\ufeff';
/** Spreadsheets in countries with a decimal comma save semicolons. */
const SEPARATORS = [',', ';', '\t'];

const UNCLOSED = 'A quotation mark opens a cell here and is never closed.';
const AFTER_QUOTE =
  'Something follows the quotation mark that closes a cell; write a quotation mark twice to mean one.';
const STRAY_QUOTE =
  'A quotation mark stands inside a cell that does not begin with one; put the cell in quotation marks.';

/**
 * The records of a text. Cells are separated by what separates the first record: comma, semicolon or tabulator.
 * Line ends within a quoted cell become line feeds, since what they were is lost on the way through a form.
 */
export function parseCsv(text: string): CsvRead {
  const body = text.startsWith(BYTE_ORDER_MARK) ? text.slice(1) : text;
  const separator = separatorOf(body);
  const records: string[][] = [];
  let record: string[] = [];
  let position = 0;
  while (position < body.length) {
    const cell = body[position] === '"' ? quotedCell(body, position) : plainCell(body, position, separator);
    if ('problem' in cell) return { ok: false, row: records.length + 1, problem: cell.problem };
    const ends = body[cell.end];
    if (ends !== undefined && ends !== separator && ends !== '\r' && ends !== '\n')
      return { ok: false, row: records.length + 1, problem: AFTER_QUOTE };
    record.push(cell.text);
    position = cell.end + 1;
    if (ends === separator) {
      // A separator at the very end is followed by one more cell, an empty one
      if (position < body.length) continue;
      record.push('');
    } else if (ends === '\r' && body[position] === '\n') position++;
    records.push(record);
    record = [];
  }
  return { ok: true, records };
}

/** The text of records, with the line ends that the standard asks for and a mark that says it is UTF-8. */
export function csvText(records: readonly (readonly string[])[]): string {
  const lines = records.map((record) => `${record.map(writtenCell).join(',')}\r\n`);
  return BYTE_ORDER_MARK + lines.join('');
}

interface Cell {
  readonly text: string;
  /** where the cell has ended: at a separator, a line end, or the end of the text */
  readonly end: number;
}

function quotedCell(body: string, start: number): Cell | { problem: string } {
  let text = '';
  let from = start + 1;
  for (;;) {
    const quote = body.indexOf('"', from);
    if (quote === -1) return { problem: UNCLOSED };
    text += body.slice(from, quote);
    if (body[quote + 1] !== '"') return { text: text.replaceAll(/\r\n?/g, '\n'), end: quote + 1 };
    text += '"';
    from = quote + 2;
  }
}

function plainCell(body: string, start: number, separator: string): Cell | { problem: string } {
  let end = start;
  while (end < body.length && body[end] !== separator && body[end] !== '\r' && body[end] !== '\n') {
    if (body[end] === '"') return { problem: STRAY_QUOTE };
    end++;
  }
  return { text: body.slice(start, end), end };
}

function separatorOf(body: string): string {
  const [first = ''] = body.split(/[\r\n]/, 1);
  const counts = SEPARATORS.map((separator) => first.split(separator).length);
  return SEPARATORS[counts.indexOf(Math.max(...counts))] ?? ',';
}

function writtenCell(text: string): string {
  return /[",;\t\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
