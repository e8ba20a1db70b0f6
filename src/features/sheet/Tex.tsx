import { setLine } from './set-tex';

/** A formula in a line. */
export function Tex({ tex }: { readonly tex: string }) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: KaTeX makes HTML only, and escapes every text in it
  return <span className="cs-tex" dangerouslySetInnerHTML={{ __html: setLine(tex) }} />;
}
