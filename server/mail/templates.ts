import type { z } from 'zod';
import type { MailContent } from './outbox';

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escaped = (text: string): string => text.replace(/[&<>"']/g, (character) => entities[character] ?? character);

/** One header line, whatever was typed: line breaks and other control characters become spaces. */
export const oneLine = (text: string): string =>
  // eslint-disable-next-line no-control-regex -- control characters are what must go
  text.replace(/[\u0000-\u001f\u007f\u0085\u2028\u2029]+/g, ' ').trim();

interface Rendered {
  text: string;
  html: string;
}

const footer = 'You get this because it concerns your part in the work. Nobody reads answers to this address.';

/** The message in plain text and in HTML, with every word of the content escaped. */
export function renderMail(
  recipientName: string,
  { paragraphs, action }: z.infer<typeof MailContent>,
  baseUrl: string,
): Rendered {
  const greeting = `${oneLine(recipientName)},`;
  const link = action && { label: oneLine(action.label), address: new URL(action.href, `${baseUrl}/`).href };
  const text = [greeting, ...paragraphs, ...(link ? [`${link.label}: ${link.address}`] : []), `-- \n${footer}`];
  const html = [
    ...[greeting, ...paragraphs].map((paragraph) => `<p>${escaped(paragraph).replace(/\r?\n/g, '<br>')}</p>`),
    ...(link ? [`<p><a href="${escaped(link.address)}">${escaped(link.label)}</a></p>`] : []),
    `<hr><p style="color:#5a6068;font-size:smaller">${escaped(footer)}</p>`,
  ];
  return {
    text: `${text.join('\n\n')}\n`,
    html: `<!doctype html><html lang="en-GB"><body style="font-family:sans-serif;color:#16191d">${html.join('')}</body></html>`,
  };
}
