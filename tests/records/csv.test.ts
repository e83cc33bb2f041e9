import { describe, expect, it } from 'vitest';
import { csvText, parseCsv } from '../../src/records/csv';
import { guardedText, unguardedText } from '../../src/records/guarded-text';

const records = (text: string) => {
  const read = parseCsv(text);
  return read.ok ? read.records : `row ${read.row}: ${read.problem}`;
};

describe('reading', () => {
  // RFC 4180, section 2, its own examples
  it('takes the forms of the standard', () => {
    expect(records('aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n')).toEqual([
      ['aaa', 'bbb', 'ccc'],
      ['zzz', 'yyy', 'xxx'],
    ]);
    expect(records('aaa,bbb,ccc\r\nzzz,yyy,xxx')).toHaveLength(2);
    expect(records('"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx')).toEqual([
      ['aaa', 'b\nbb', 'ccc'],
      ['zzz', 'yyy', 'xxx'],
    ]);
    expect(records('"aaa","b""bb","ccc"')).toEqual([['aaa', 'b"bb', 'ccc']]);
  });

  it('takes line feeds alone, a byte order mark, and empty cells at either end', () => {
    expect(records('\ufeffa,b\n,\n"",x\n')).toEqual([
      ['a', 'b'],
      ['', ''],
      ['', 'x'],
    ]);
    expect(records('a,b\r1,')).toEqual([
      ['a', 'b'],
      ['1', ''],
    ]);
    expect(records('')).toEqual([]);
  });

  it('goes by what separates the header: commas, semicolons or tabulators', () => {
    expect(records('a;b\n1,5;2')).toEqual([
      ['a', 'b'],
      ['1,5', '2'],
    ]);
    expect(records('a\tb\n1\t2')).toEqual([
      ['a', 'b'],
      ['1', '2'],
    ]);
  });

  it('names the row of a quotation mark that is out of place', () => {
    expect(records('a,b\n"x,y\n')).toMatch(/^row 2: .*never closed/);
    expect(records('a,b\n"x"y,z')).toMatch(/^row 2: Something follows/);
    expect(records('a,b\n1,2\nx"y,z')).toMatch(/^row 3: .*inside a cell/);
  });
});

it('what is written reads back the same', () => {
  const written = [
    ['name', 'note'],
    ['Arden – Birk', 'said "as found", then\nset; tab\there'],
    ['', ' leading and trailing '],
  ];
  expect(csvText(written).startsWith('\ufeffname,note\r\n')).toBe(true);
  expect(records(csvText(written))).toEqual(written);
});

it('a text that a spreadsheet would run is written as text, and reads back the same', () => {
  for (const text of ['=1+1', '+49 30', '-x', '@a', "'=1", "''+", 'plain', "'plain", ''])
    expect(unguardedText(guardedText(text))).toBe(text);
  expect(guardedText('=HYPERLINK("x")')).toBe(`'=HYPERLINK("x")`);
});
