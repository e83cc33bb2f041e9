import { z } from 'zod';

/** The three files that the register is exported to and imported from; a file is told by its header. */
export const IMPORT_KINDS = ['lines', 'terminals', 'settings'] as const;
export const importKindSchema = z.enum(IMPORT_KINDS);
export type ImportKind = z.infer<typeof importKindSchema>;

/** What is wrong with one cell. The header is row 1, as a spreadsheet counts; `field` is a column's name. */
export const rowProblemSchema = z.object({ row: z.int(), field: z.string(), problem: z.string() });
export type RowProblem = z.infer<typeof rowProblemSchema>;

/** What a row does to the register; `fields` are the columns that it changes. */
export const importRowSchema = z.object({
  row: z.int(),
  subject: z.string(),
  outcome: z.enum(['added', 'changed', 'left']),
  fields: z.array(z.string()),
});
export type ImportRow = z.infer<typeof importRowSchema>;

/** What an import would do, or did. Nothing is written while there is a single problem. */
export const importReportSchema = z.object({
  kind: importKindSchema.nullable(),
  written: z.boolean(),
  /** the batch as it was recorded; null while nothing is written */
  batch: z.int().nullable(),
  /** the register's revision that the report holds for */
  revision: z.int(),
  rows: z.array(importRowSchema),
  problems: z.array(rowProblemSchema),
});
export type ImportReport = z.infer<typeof importReportSchema>;

/** One file that was written into the register: by whom, and what of it was new, changed, or already so. */
export interface ImportBatch {
  readonly id: number;
  readonly importedAt: Date;
  readonly importedBy: string;
  readonly kind: ImportKind;
  readonly fileName: string;
  readonly addedCount: number;
  readonly changedCount: number;
  readonly leftCount: number;
}
