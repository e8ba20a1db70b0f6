interface FormulaProps {
  /** HTML of KaTeX, which escapes what the formula holds. */
  readonly html: string;
  readonly className?: string;
}

/** A formula that was set before. */
export function Formula({ html, className }: FormulaProps) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: KaTeX makes HTML only, and escapes every text in it
  return <span className={className} dangerouslySetInnerHTML={{ __html: html }} />;
}
