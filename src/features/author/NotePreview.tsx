import { MarkdownHtml } from '@/components/ui/MarkdownHtml';
import { markdown } from '@/lib/markdown';

/** A note as readers of the template will see it. */
export function NotePreview({ text }: { readonly text: string }) {
  return <MarkdownHtml html={markdown(text)} className="border-l-2 border-rule-strong pl-14" />;
}
