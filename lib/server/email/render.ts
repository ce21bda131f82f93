import { type MailBlock } from './blocks';

export interface RenderedMail {
  readonly text: string;
  readonly html: string;
}

const ESCAPES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (c) => ESCAPES[c] ?? c);

const BODY = 'margin:0;padding:24px;background:#f6f3ea;color:#1b2430;font:16px/24px sans-serif';
const SHEET = 'max-width:560px;margin:0 auto;padding:24px;background:#fffdf7;border:1px solid #d9d3c2';
const HEADING = 'margin:0 0 16px;font-size:20px;line-height:28px;font-weight:600';
const BUTTON =
  'display:inline-block;padding:8px 16px;background:#0b6b6b;color:#ffffff;font-weight:600;text-decoration:none';
const NOTE = 'font-size:12px;line-height:16px;color:#56606e;word-break:break-all';

/** The full address of a path of ours. Throws if the path would lead to another site. */
export function linkTo(path: string, appUrl: string): string {
  const url = new URL(path, appUrl);
  if (!path.startsWith('/') || url.origin !== new URL(appUrl).origin) {
    throw new Error(`${JSON.stringify(path)} is not a path of this application.`);
  }
  return url.href;
}

function blockAsText(block: MailBlock, appUrl: string): string {
  return block.kind === 'link' ? `${block.label}:\n${linkTo(block.path, appUrl)}` : block.text;
}

function blockAsHtml(block: MailBlock, appUrl: string): string {
  if (block.kind === 'heading') return `<h1 style="${HEADING}">${escapeHtml(block.text)}</h1>`;
  if (block.kind === 'paragraph') {
    return `<p style="margin:0 0 16px">${escapeHtml(block.text).replace(/\n/g, '<br>')}</p>`;
  }
  const href = escapeHtml(linkTo(block.path, appUrl));
  const button = `<a href="${href}" style="${BUTTON}">${escapeHtml(block.label)}</a>`;
  return `<p style="margin:0 0 8px">${button}</p>\n<p style="${NOTE}">${href}</p>`;
}

/** Both parts of a message. Every text is escaped; links stand written out as well, for readers without HTML. */
export function renderMail(blocks: readonly MailBlock[], appUrl: string): RenderedMail {
  const text = `${blocks.map((block) => blockAsText(block, appUrl)).join('\n\n')}\n\n--\nPolhode, ${appUrl}\n`;
  const html = `<!doctype html>
<html lang="en">
<meta charset="utf-8">
<body style="${BODY}">
<div style="${SHEET}">
${blocks.map((block) => blockAsHtml(block, appUrl)).join('\n')}
</div>
<p style="${NOTE};text-align:center">Polhode, ${escapeHtml(appUrl)}</p>
</body>
</html>
`;
  return { text, html };
}
