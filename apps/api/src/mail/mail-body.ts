/** What a mail of ours looks like: one narrow column that reads well on a phone, and the same words as plain text. */

export interface MailBody {
  readonly text: string;
  readonly html: string;
}

export interface MailParts {
  readonly title: string;
  readonly paragraphs: readonly string[];
  /** Label and value, such as `AOS` and `2026-335 14:05:09 UTC`. */
  readonly facts?: readonly (readonly [label: string, value: string])[];
  readonly action?: { readonly label: string; readonly url: string };
  /** Cautions and the reason why the reader gets this mail; small, last. */
  readonly notes?: readonly string[];
}

const ESCAPES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text for HTML, in element content and in quoted attributes alike. */
export const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (mark) => ESCAPES[mark] ?? mark);

const FONT = 'font-family:Manrope,Segoe UI,Helvetica,Arial,sans-serif';

/** Both bodies of a mail from the same parts; every part is escaped here, so callers pass plain text. */
export function mailBody(parts: MailParts): MailBody {
  return { text: plainText(parts), html: htmlPage(parts) };
}

function plainText({ title, paragraphs, facts = [], action, notes = [] }: MailParts): string {
  const width = Math.max(0, ...facts.map(([label]) => label.length));
  const blocks = [
    title,
    ...paragraphs,
    facts.map(([label, value]) => `${label.padEnd(width)}  ${value}`).join('\n'),
    action ? `${action.label}:\n${action.url}` : '',
    notes.length > 0 ? `--\n${notes.join('\n')}` : '',
  ];
  return `${blocks.filter(Boolean).join('\n\n')}\n`;
}

function htmlPage({ title, paragraphs, facts = [], action, notes = [] }: MailParts): string {
  const rows = facts.map(
    ([label, value]) =>
      `<tr><td style="padding:4px 16px 4px 0;color:#5a6a72;vertical-align:top">${escapeHtml(label)}</td>` +
      `<td style="padding:4px 0">${escapeHtml(value)}</td></tr>`,
  );
  return [
    '<!doctype html><html lang="en"><head><meta charset="utf-8">',
    '<meta name="viewport" content="width=device-width, initial-scale=1">',
    `<title>${escapeHtml(title)}</title></head>`,
    `<body style="margin:0;padding:24px 16px;${FONT};font-size:16px;line-height:1.5;color:#12222b">`,
    '<div style="max-width:560px;margin:0 auto">',
    `<h1 style="font-size:20px;line-height:1.3;margin:0 0 16px">${escapeHtml(title)}</h1>`,
    ...paragraphs.map((paragraph) => `<p style="margin:0 0 16px">${escapeHtml(paragraph)}</p>`),
    ...(rows.length > 0 ? [`<table style="border-collapse:collapse;margin:0 0 16px">${rows.join('')}</table>`] : []),
    ...(action ? [button(action)] : []),
    ...notes.map((note) => `<p style="margin:16px 0 0;font-size:13px;color:#5a6a72">${escapeHtml(note)}</p>`),
    '</div></body></html>',
  ].join('\n');
}

const button = ({ label, url }: { label: string; url: string }): string =>
  `<p style="margin:0 0 16px"><a href="${escapeHtml(url)}" style="display:inline-block;padding:12px 20px;` +
  `background:#12222b;color:#ffffff;text-decoration:none;border-radius:4px">${escapeHtml(label)}</a></p>` +
  `<p style="margin:0 0 16px;font-size:13px;word-break:break-all">${escapeHtml(url)}</p>`;
