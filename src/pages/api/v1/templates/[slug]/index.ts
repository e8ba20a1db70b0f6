import { templateView, toTemplateView } from '@/features/template/item';
import { readTemplate } from '@/features/template/template.server';
import { answer, endpoint } from '@/http/endpoint';

export const GET = endpoint(
  {
    summary: 'Read a template',
    description: 'The revision that stands for it, with its document and the history of its revisions.',
    answer: templateView,
  },
  async ({ params }, { user }) => {
    const { row, template, history, sha256 } = await readTemplate(user, { slug: params['slug'] ?? '' });
    return answer(toTemplateView(row, template, history), { headers: { ETag: `"${sha256}"` } });
  },
);
