import { Bundle } from '@/features/review/bundle';
import { exportBundle } from '@/features/review/bundle.server';
import { answer, endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';

export const GET = endpoint(
  {
    summary: 'A revision as a file for another practice',
    description: 'Taken in there as a draft: POST …/drafts with it as `bundle`.',
    answer: Bundle,
  },
  async ({ params }, { user }) => {
    const bundle = await exportBundle(user, revisionKey(params));
    const name = `${bundle.slug}-${bundle.revision}.json`;
    return answer(bundle, { headers: { 'Content-Disposition': `attachment; filename="${name}"` } });
  },
);
