const LONGEST = 150;
const WITHOUT_A_NAME = 'upload.csv';

/**
 * The name of an uploaded file as its sender gives it: `X-File-Name` (percent-encoded UTF-8), or `filename*` or `filename` of
 * Content-Disposition (RFC 6266). A name for people to read: no folders, no control or direction marks, 150 characters at most.
 */
export function sentFileName(headers: Headers): string {
  const disposition = headers.get('content-disposition') ?? '';
  const given =
    headers.get('x-file-name') ??
    /filename\*\s*=\s*UTF-8'[^']*'([^;]+)/i.exec(disposition)?.[1] ??
    /filename\s*=\s*"((?:[^"\\]|\\.)*)"/i.exec(disposition)?.[1]?.replace(/\\(.)/g, '$1') ??
    /filename\s*=\s*([^;"]+)/i.exec(disposition)?.[1];
  return cleanFileName(decoded(given ?? ''));
}

function cleanFileName(text: string): string {
  const name = text.normalize('NFC').replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/gu, '');
  const last = name.split(/[\\/]/).at(-1) ?? '';
  const shown = last.trim().replace(/^[.\s]+/, '');
  return [...shown].slice(0, LONGEST).join('') || WITHOUT_A_NAME;
}

/** Text that is not percent-encoding after all is taken as it stands. */
function decoded(text: string): string {
  return /%(?![0-9a-f]{2})/i.test(text) ? text : decodeOrKeep(text);
}

function decodeOrKeep(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch (error) {
    if (error instanceof URIError) return text;
    throw error;
  }
}
