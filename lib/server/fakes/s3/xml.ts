type Node = string | number | boolean | readonly Node[] | { readonly [tag: string]: Node };

const escape = (text: string) =>
  text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c] ?? c);

const body = (node: Node): string =>
  typeof node === 'object'
    ? Object.entries(node)
        .map(([tag, child]) => element(tag, child))
        .join('')
    : escape(String(node));

const element = (tag: string, node: Node): string =>
  Array.isArray(node)
    ? node.map((child: Node) => element(tag, child)).join('')
    : `<${tag}>${body(node)}</${tag}>`;

/** An XML document of one element; an array repeats its tag. */
export const xml = (tag: string, node: Node): string =>
  `<?xml version="1.0" encoding="UTF-8"?>\n${element(tag, node)}`;

const unescape = (text: string) =>
  text
    .replace(/&quot;/g, '"')
    .replace(/&#34;/g, '"')
    .replace(/&lt;/g, '<')
    .replace(/&gt;/g, '>')
    .replace(/&amp;/g, '&');

/** The contents of each `tag` in `text`, which holds no nesting of it: enough for the protocol's small requests. */
export function contents(text: string, tag: string): string[] {
  return [...text.matchAll(new RegExp(`<${tag}>([\\s\\S]*?)</${tag}>`, 'g'))].map((match) => match[1] ?? '');
}

/** The text of the first `tag` in `text`, or null. */
export function textOf(text: string, tag: string): string | null {
  const [first] = contents(text, tag);
  return first === undefined ? null : unescape(first);
}
