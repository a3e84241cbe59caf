/** Hands a file made in the page to the browser. */
export function download(name: string, content: Blob | string, type = 'text/plain;charset=utf-8'): void {
  const blob = typeof content === 'string' ? new Blob([content], { type }) : content;
  const url = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}

/** The byte order mark tells spreadsheets that the text is UTF-8. */
export const downloadCsv = (name: string, csv: string): void =>
  download(`${name}.csv`, `\uFEFF${csv}`, 'text/csv;charset=utf-8');
