import { formatDistanceStrict } from 'date-fns/formatDistanceStrict';

/** A true minus sign and U+2009 between groups: figures as a drawing office writes them. */
const minus = '−';
const thin = '\u2009';

const group = (whole: string) => (whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, thin) : whole);

const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const raised = (exponent: number) =>
  (exponent < 0 ? '⁻' : '') +
  String(Math.abs(exponent)).replace(/\d/g, (digit) => superscripts[Number(digit)] ?? digit);

/**
 * A number with a fixed count of significant digits: `1.30`, `−6.06`, `12 400`, `2.00·10⁻⁹`.
 * @param digits significant digits; 3 unless the figure deserves more.
 */
export function formatNumber(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? 'not a number' : `${value < 0 ? minus : ''}∞`;
  if (value === 0) return '0';
  const [mantissa = '0', exponentText = '0'] = Math.abs(value)
    .toExponential(digits - 1)
    .split('e');
  const exponent = Number(exponentText);
  const sign = value < 0 ? minus : '';
  if (exponent < -4 || exponent > 6) return `${sign}${mantissa}·10${raised(exponent)}`;
  const decimals = Math.max(0, digits - 1 - exponent);
  const [whole = '0', fraction] = Number(`${mantissa}e${exponent}`).toFixed(decimals).split('.');
  return `${sign}${group(whole)}${fraction === undefined ? '' : `.${fraction}`}`;
}

/** With its sign always written, as margins need it. */
export const formatSigned = (value: number, digits = 3): string =>
  value > 0 ? `+${formatNumber(value, digits)}` : formatNumber(value, digits);

/** A fraction as per cent: `8.7 %`. */
export const formatPercent = (fraction: number, digits = 2): string => `${formatNumber(fraction * 100, digits)} %`;

/** A count with its noun: `1 remark`, `3 remarks`. */
export const formatCount = (count: number, one: string, many = `${one}s`): string =>
  `${group(String(count))} ${count === 1 ? one : many}`;

/** How long ago, in the fewest words: `just now`, `4 s ago`, `12 min ago`, `3 h ago`, `2 days ago`. */
export function formatAgo(time: string | Date, now: Date = new Date()): string {
  const then = new Date(time);
  const seconds = Math.round((now.getTime() - then.getTime()) / 1000);
  if (seconds < 2) return 'just now';
  if (seconds < 60) return `${seconds} s ago`;
  if (seconds < 3600) return `${Math.floor(seconds / 60)} min ago`;
  if (seconds < 86_400) return `${Math.floor(seconds / 3600)} h ago`;
  return `${formatDistanceStrict(then, now, { roundingMethod: 'floor' })} ago`;
}

const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const dateAndTime = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
});

/** `14 Mar 2026`, in the reader's own time zone. */
export const formatDate = (time: string | Date): string => date.format(new Date(time));
/** `14 Mar 2026, 09:32`, in the reader's own time zone. */
export const formatDateTime = (time: string | Date): string => dateAndTime.format(new Date(time));

/** `1.4 kB`, `12 MB`. */
export function formatBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  const power = Math.min(3, Math.floor(Math.log10(bytes) / 3));
  return `${formatNumber(bytes / 1000 ** power, 2)} ${['B', 'kB', 'MB', 'GB'][power] ?? 'GB'}`;
}
