/** A file as it was sent, or why it cannot be read. */
export type UploadedFile =
  | { readonly ok: true; readonly text: string; readonly name: string }
  | { readonly ok: false; readonly status: 400 | 413 | 415; readonly problem: string };

export const FILE_BYTES_MOST = 200 * 1024;
const TOO_LARGE = `The file is larger than the ${FILE_BYTES_MOST / 1024} KB allowed; import it in parts.`;
const NOT_UTF8 =
  'The file is not UTF-8 text. Save it as CSV with the encoding UTF-8; a workbook itself cannot be read.';

/** The bytes of a file as text. */
export function uploadedText(bytes: ArrayBuffer, name: string): UploadedFile {
  if (bytes.byteLength > FILE_BYTES_MOST) return { ok: false, status: 413, problem: TOO_LARGE };
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    if (text.includes('\0')) return { ok: false, status: 400, problem: NOT_UTF8 };
    return { ok: true, text, name };
  } catch {
    return { ok: false, status: 400, problem: NOT_UTF8 };
  }
}

/** The file of a request: its body as `text/csv`, or the part named `file` of a form. */
export async function uploadedFile(request: Request, name: string): Promise<UploadedFile> {
  const type = request.headers.get('content-type') ?? '';
  if (/^text\/csv\b/i.test(type)) return uploadedText(await request.arrayBuffer(), name);
  if (!/^multipart\/form-data\b/i.test(type))
    return { ok: false, status: 415, problem: 'Send a file as text/csv, or as the part "file" of a form.' };
  const part = await fileOfForm(request);
  if (part === undefined) return { ok: false, status: 400, problem: 'The form has no file in "file".' };
  return uploadedText(await part.arrayBuffer(), part.name);
}

async function fileOfForm(request: Request): Promise<File | undefined> {
  try {
    const part = (await request.formData()).get('file');
    return part instanceof File ? part : undefined;
  } catch {
    return undefined;
  }
}
