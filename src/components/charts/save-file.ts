/** Hands a text to the person as a file, from memory. */
export function saveTextFile(name: string, text: string): void {
  // The mark in front lets spreadsheets read the file as UTF-8.
  const url = URL.createObjectURL(new Blob(['\uFEFF', text], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}
