interface MarkdownHtmlProps {
  /** What `markdown` of lib/markdown.ts makes of a note. */
  readonly html: string;
  readonly className?: string;
}

/** A note in Markdown that was set before. */
export function MarkdownHtml({ html, className = '' }: MarkdownHtmlProps) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: lib/markdown.ts makes its own tags only, and escapes every text
  return <div className={`markdown ${className}`} dangerouslySetInnerHTML={{ __html: html }} />;
}
