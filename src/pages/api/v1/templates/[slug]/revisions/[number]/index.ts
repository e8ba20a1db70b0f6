import { templateView, toTemplateView } from '@/features/template/item';
import { readTemplate } from '@/features/template/template.server';
import { answer, endpoint } from '@/http/endpoint';
import { numberParam } from '@/http/params';

export const GET = endpoint(
  { summary: 'Read one revision of a template', answer: templateView },
  async ({ params }, { user }) => {
    const number = numberParam(params, 'number', 'This revision of the template');
    const read = await readTemplate(user, { slug: params['slug'] ?? '', number });
    return answer(toTemplateView(read.row, read.template, read.history), {
      headers: { ETag: `"${read.sha256}"` },
    });
  },
);
