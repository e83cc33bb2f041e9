/**
 * A spreadsheet runs what looks like a formula, and a name in the register is whatever somebody typed. Such a text
 * is written with an apostrophe in front, which spreadsheets show as text, and read back without it.
 */
const FORMULA = /^'*[=+\-@\t\r]/;
const GUARDED = /^'+[=+\-@\t\r]/;

export const guardedText = (text: string): string => (FORMULA.test(text) ? `'${text}` : text);

export const unguardedText = (cell: string): string => (GUARDED.test(cell) ? cell.slice(1) : cell);
