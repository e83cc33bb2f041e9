import { describe, expect, it } from 'vitest';
import { csvName, csvText } from '../../src/view/line-csv';
import { tableCsv } from '../../src/view/line-table';

describe('saved figures', () => {
  it('rows end in CRLF and missing values are empty', () => {
    expect(csvText(['instant', 'A'], [['x', null]])).toBe('instant,A\r\nx,\r\n');
  });

  it('a comma, a quote or a line break in a text is quoted', () => {
    expect(csvText(['a,b'], [['say "so"'], ['two\nlines']])).toBe(
      '"a,b"\r\n"say ""so"""\r\n"two\nlines"\r\n',
    );
  });

  it('a text that a spreadsheet would run stays a text', () => {
    expect(csvText(['name'], [['=1+1'], ['-x']])).toBe("name\r\n'=1+1\r\n'-x\r\n");
  });

  it('a negative figure is a figure', () => {
    expect(csvText(['A'], [[-1.5]])).toBe('A\r\n-1.5\r\n');
  });

  it('what is not a number is empty', () => {
    expect(csvText(['A'], [[NaN], [Infinity]])).toBe('A\r\n\r\n\r\n');
  });

  it('a table is saved with instants in UTC and figures to their decimals', () => {
    const csv = tableCsv({
      caption: 'levels',
      columns: [
        { kind: 'instant', head: 'hour from' },
        { kind: 'text', head: 'phase' },
        { kind: 'figure', head: 'median, A', digits: 1 },
      ],
      rows: [[Date.UTC(2026, 2, 1, 10), 'B', 38.26]],
    });
    expect(csv).toBe('hour from (UTC),phase,"median, A"\r\n2026-03-01T10:00:00.000Z,B,38.3\r\n');
  });

  it('a file is named by the line, the figures and the day', () => {
    expect(csvName(['hask-ostrel', 'standing', 'two months'], Date.UTC(2026, 2, 1))).toBe(
      'hask-ostrel-standing-two-months-2026-03-01.csv',
    );
  });
});
