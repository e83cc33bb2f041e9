import { defineAction } from 'astro:actions';
import { requireAbility, roleSentence } from '../auth/guard';
import type { Person } from '../auth/person';
import type { ImportReport } from '../contract/register-import';
import { registerPlan } from '../records/register-plan';
import { uploadedText, type UploadedFile } from '../records/uploaded-file';
import type { Site } from '../server/site';
import { databaseIsAway } from '../store/database-away';
import { dryImport, writeImport, type Plan } from '../store/register-import';

/** What the import's form comes back with: the file as it was read, and what it would do or did. */
export type ImportOutcome =
  | { readonly ok: false; readonly status: number; readonly problem: string }
  | {
      readonly ok: true;
      readonly report: ImportReport;
      readonly text: string;
      readonly fileName: string;
      /** the register has changed since the file was looked at, so it is shown again and not written */
      readonly moved: boolean;
    };

/** The file is chosen and looked at first, then sent once more with what was looked at to be written. */
export const importRegister = defineAction({
  accept: 'form',
  handler: async (form: FormData, { locals }): Promise<ImportOutcome> => {
    const { person, site } = locals;
    if (person === undefined) return { ok: false, status: 401, problem: 'Sign in first.' };
    if (requireAbility({ locals }, 'edit the register') !== undefined)
      return { ok: false, status: 403, problem: roleSentence(person, 'edit the register') };
    try {
      const file = await sentFile(form);
      return file.ok ? await looked(form, { file, site, person }) : file;
    } catch (error) {
      if (databaseIsAway(error))
        return { ok: false, status: 503, problem: 'Tareline cannot reach its database. Nothing is written.' };
      console.error('An import of the register failed:', error);
      return { ok: false, status: 500, problem: 'Something went wrong here and nothing is written.' };
    }
  },
});

type ReadFile = Extract<UploadedFile, { ok: true }>;

async function looked(
  form: FormData,
  { file, site, person }: { file: ReadFile; site: Site; person: Person },
): Promise<ImportOutcome> {
  const plan: Plan = (register) => registerPlan(file.text, register);
  const seen = { ok: true, text: file.text, fileName: file.name, moved: false } as const;
  const looked = await dryImport(site.store, plan);
  if (looked.kind === 'settings' && requireAbility({ locals: { person } }, 'record settings') !== undefined)
    return { ok: false, status: 403, problem: roleSentence(person, 'record settings') };
  if (form.get('step') !== 'write') return { ...seen, report: looked };
  const revision = Number(form.get('revision'));
  const editing = { by: person, nowMs: site.now() };
  const report = await writeImport(site.store, { plan, fileName: file.name, revision }, editing);
  return { ...seen, report, moved: !report.written && report.problems.length === 0 };
}

/** A file just chosen, or the text of one that was looked at before. */
async function sentFile(form: FormData): Promise<UploadedFile> {
  const text = form.get('text');
  const name = form.get('fileName');
  if (typeof text === 'string')
    return uploadedText(
      new TextEncoder().encode(text).buffer as ArrayBuffer,
      typeof name === 'string' ? name : '',
    );
  const file = form.get('file');
  if (!(file instanceof File) || file.size === 0)
    return { ok: false, status: 400, problem: 'Choose a file first.' };
  return uploadedText(await file.arrayBuffer(), file.name);
}
