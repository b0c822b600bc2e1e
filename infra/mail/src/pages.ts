import type { Message, MessageSummary } from './message-store.js';

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (letter) => `&#${letter.charCodeAt(0)};`);
}

function utc(ms: number): string {
  return new Date(ms).toISOString().slice(0, 19).replace('T', ' ');
}

export const STYLE = `
:root { color-scheme: light dark; --paper: #f5f2ea; --ink: #14303a; --line: #b9c4c2; --deep: #0e5a6b; }
@media (prefers-color-scheme: dark) { :root { --paper: #10242c; --ink: #e9efe9; --line: #3d565e; --deep: #8fc9c2; } }
body { margin: 0 auto; max-width: 60rem; padding: 1rem; background: var(--paper); color: var(--ink); font: 16px/1.5 system-ui, sans-serif; }
table { border-collapse: collapse; width: 100%; } th, td { text-align: left; padding: .3rem .6rem; border-bottom: 1px solid var(--line); overflow-wrap: anywhere; }
pre { white-space: pre-wrap; border: 1px solid var(--line); padding: 1rem; }
iframe { width: 100%; height: 32rem; border: 1px solid var(--line); background: #fff; }
a { color: var(--deep); } :focus-visible { outline: 3px solid var(--deep); outline-offset: 2px; }
`;

function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escaped(title)}</title><link rel="stylesheet" href="/style.css"></head>
<body><p>Local mail stand-in. These messages were sent to nobody.</p>${body}</body></html>`;
}

export function listPage(messages: readonly MessageSummary[], to: string | undefined): string {
  const rows = messages.map(
    ({ id, receivedMs, to: recipients, subject, attachments }) =>
      `<tr><td>${utc(receivedMs)}</td><td>${escaped(recipients.join(', '))}</td><td><a href="/messages/${id}">${escaped(subject || '(no subject)')}</a></td><td>${attachments.length || ''}</td></tr>`,
  );
  const heading = to === undefined ? 'Mail' : `Mail to ${escaped(to)}`;
  const table = `<table><thead><tr><th>Received (UTC)</th><th>To</th><th>Subject</th><th>Attachments</th></tr></thead><tbody>${rows.join('')}</tbody></table>`;
  return page('Mail', `<h1>${heading}</h1>${rows.length === 0 ? '<p>Nothing has arrived yet.</p>' : table}`);
}

/** The HTML part stands in a frame that may not run scripts, send forms or load anything. */
export function messagePage(message: Message): string {
  const { id, subject, headers, to, receivedMs, attachments, text, html } = message;
  const files = attachments.map(
    ({ name, sizeBytes }, index) =>
      `<li><a href="/messages/${id}/attachments/${index}">${escaped(name)}</a> (${sizeBytes} bytes)</li>`,
  );
  const body = `<p><a href="/">All mail</a></p><h1>${escaped(subject || '(no subject)')}</h1>
<table><tr><th>From</th><td>${escaped(headers.from)}</td></tr><tr><th>To</th><td>${escaped(headers.to)}</td></tr>
<tr><th>Delivered to</th><td>${escaped(to.join(', '))}</td></tr><tr><th>Received (UTC)</th><td>${utc(receivedMs)}</td></tr></table>
${files.length === 0 ? '' : `<h2>Attachments</h2><ul>${files.join('')}</ul>`}
${html === null ? '' : `<h2>As HTML</h2><iframe sandbox="" title="The message as HTML" src="/messages/${id}/html"></iframe>`}
<h2>As text</h2><pre>${escaped(text)}</pre>`;
  return page(subject, body);
}

export function missingPage(): string {
  return page('Not found', '<h1>There is no such message.</h1><p><a href="/">All mail</a></p>');
}
