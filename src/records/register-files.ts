import type { ImportKind } from '../contract/register-import';
import type { RegisterLine } from '../contract/register';
import { lineCells } from './lines-sheet';
import { settingsCells } from './settings-sheet';
import { sheetText } from './sheet';
import { terminalCells, terminalEntries } from './terminals-sheet';

/** The register as one of its three files. */
export function registerFile(kind: ImportKind, lines: readonly RegisterLine[]): string {
  switch (kind) {
    case 'lines':
      return sheetText(kind, lines.map(lineCells));
    case 'terminals':
      return sheetText(kind, lines.flatMap(terminalEntries).map(terminalCells));
    case 'settings':
      return sheetText(
        kind,
        lines.flatMap((line) => line.settings.map((version) => settingsCells(line.key, version))),
      );
  }
}
