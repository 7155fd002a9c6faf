/** Saves a text as a file. The byte order mark tells spreadsheets that it is UTF-8. */
export function saveCsv({ fileName, csv }: { fileName: string; csv: string }): void {
  const address = URL.createObjectURL(new Blob(['\uFEFF', csv], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName;
  link.click();
  // Not at once: the browser may still be reading it.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
