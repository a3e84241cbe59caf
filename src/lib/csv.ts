export type CsvValue = string | number | boolean | null | undefined;

/** A cell by RFC 4180; a text that a spreadsheet would take for a formula is told to be text. */
function cell(value: CsvValue): string {
  if (value === null || value === undefined) return '';
  if (typeof value !== 'string') return String(value);
  const text = /^[=+\-@\t\r]/.test(value) && !/^[+-]?[\d.]+(e[+-]?\d+)?$/i.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Comma-separated text with a line for the heads, lines ended by CR LF. */
export const csvOf = (heads: readonly string[], rows: readonly (readonly CsvValue[])[]): string =>
  [heads, ...rows].map((row) => row.map(cell).join(',')).join('\r\n') + '\r\n';
