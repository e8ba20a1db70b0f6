import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';

/** HTML as Markdown would take it over (CommonMark 6.6): a tag, a comment, a declaration. */
const HTML = /<\/?[a-z][^<>]*>|<!--|<![a-z]|<\?/i;
/** A link that runs a script when it is followed. */
const SCRIPT_LINK = /(?:\]\(|\]:)\s*<?\s*(?:javascript|vbscript|data):/i;

/**
 * Faults of the Markdown in a document: HTML has no place in it, nor a link that runs a script. `places` are the paths
 * of its notes. A screen that prints a note escapes what it holds; here its author learns of it.
 */
export const noteFaults = (
  notes: readonly (readonly [path: readonly PropertyKey[], text: unknown])[],
): Fault[] =>
  notes.flatMap(([path, text]) => {
    if (typeof text !== 'string') return [];
    const found = (HTML.exec(text) ?? SCRIPT_LINK.exec(text))?.[0];
    if (found === undefined) return [];
    const message = `“${found.slice(0, 40)}” is HTML or a script, which a note cannot hold. Write it in Markdown.`;
    return [{ pointer: pointer(path), code: 'html', message }];
  });
