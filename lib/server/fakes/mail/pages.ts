import { type Mail } from './mailbox';

const ESCAPES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const escape = (text: string) => text.replace(/[&<>"']/g, (c) => ESCAPES[c] ?? c);

const page = (title: string, body: string) => `<!doctype html>
<html lang="en">
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(title)}</title>
<style>
  body { font: 14px/20px system-ui, sans-serif; color: #1b2430; background: #f6f3ea; margin: 24px auto; max-width: 880px; padding: 0 16px; }
  table { border-collapse: collapse; width: 100%; }
  td, th { text-align: left; padding: 8px; border-bottom: 1px solid #d9d3c2; vertical-align: top; }
  a { color: #0b6b6b; }
  pre { white-space: pre-wrap; background: #fffdf7; padding: 16px; }
  iframe { width: 100%; height: 480px; border: 1px solid #d9d3c2; background: #fff; }
</style>
<body>
${body}
</body>
</html>
`;

export function listPage(mails: readonly Mail[]): string {
  const rows = mails.map(
    (mail) => `<tr><td>${escape(mail.received.slice(0, 19).replace('T', ' '))}</td>
<td>${escape(mail.to.join(', '))}</td><td><a href="/mails/${mail.id}">${escape(mail.subject || 'No subject')}</a></td></tr>`,
  );
  const table = `<table><tr><th>Received, UTC<th>To<th>Subject</tr>\n${rows.join('\n')}</table>`;
  const nothing =
    '<p>No mail yet. What Polhode sends on this machine arrives here and goes nowhere else.</p>';
  return page('Mailbox', `<h1>Mailbox</h1>\n${mails.length > 0 ? table : nothing}`);
}

/** One message: the HTML part in a frame without scripts, the text part as it is with its links live. */
export function mailPage(mail: Mail): string {
  const text = escape(mail.text).replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`);
  const frame = mail.html
    ? `<h2>HTML part</h2>\n<iframe sandbox="allow-popups allow-top-navigation-by-user-activation" srcdoc="${escape(mail.html)}" title="HTML part"></iframe>`
    : '';
  return page(
    mail.subject,
    `<p><a href="/">Mailbox</a></p><h1>${escape(mail.subject)}</h1>
<p>From ${escape(mail.from)}<br>To ${escape(mail.to.join(', '))}<br>${escape(mail.received)}</p>
<h2>Text part</h2>\n<pre>${text}</pre>\n${frame}`,
  );
}
