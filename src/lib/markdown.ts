import { micromark } from 'micromark';

/** Longer than any note of a document (8000) and any comment (4000); what is longer is shown as it was written. */
const LONGEST = 16_000; // characters
/** Marks of emphasis, links and code take time with their square; a note for people has a hundred. */
const MOST_MARKS = 1000;
const MARK = /[*_`[\]<&]/g;
/** More quotes and list items inside one another than this. */
const DEEP = /^[ \t]*(?:>[ \t]*|(?:[-+*]|\d{1,9}[.)])[ \t]+){13}/m;
const MOST_INDENT = /^[ \t]{48}/m;

/**
 * HTML of a note in Markdown (CommonMark), safe to be put on a page: HTML in it is shown as text, a picture becomes a link,
 * a link leads to http(s) or mailto or nowhere, and headings stand below those of the page. Letters after "M_" are lowered.
 * A note that is too long, too dense or too deep to be one is shown as it was written.
 */
export function markdown(text: string): string {
  if (text.length > LONGEST || (text.match(MARK)?.length ?? 0) > MOST_MARKS || isDeep(text))
    return `<p>${escaped(text)}</p>`;
  const html = micromark(text, {
    extensions: [{ disable: { null: ['htmlFlow', 'htmlText', 'labelStartImage'] } }],
  });
  return html.replaceAll(PARTS, (part, symbol?: string, index?: string) =>
    symbol === undefined ? tag(part) : `${symbol}<sub>${index}</sub>`,
  );
}

const isDeep = (text: string): boolean => DEEP.test(text) || MOST_INDENT.test(text);

/** Code as it is; a tag; or a symbol with its index. Micromark writes no ">" into an attribute. */
const PARTS = /<code\b[^>]*>[^<]*<\/code>|<[^>]+>|(?<![\p{L}\p{N}_/.])(\p{L}{1,2})_([\p{L}\p{N}]+)/gu;

/** A tag that micromark wrote. */
function tag(written: string): string {
  const heading = /^<(\/?)h([1-6])>$/.exec(written);
  if (heading) return `<${heading[1]}h${Math.min(6, Number(heading[2]) + 2)}>`;
  const href = /^<a href="([^"]*)"/.exec(written)?.[1];
  if (href === undefined) return written;
  return /^(?:https?|mailto):/i.test(href) ? `<a href="${href}" rel="noopener noreferrer">` : '<a>';
}

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: string): string => text.replaceAll(/[&<>"]/g, (sign) => ENTITIES[sign] ?? sign);
