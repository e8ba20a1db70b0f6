import { CommentView } from '@/features/review/comment';
import { resolveComment } from '@/features/review/comment.server';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';
import { listOf, wholeList } from '@/http/list';
import { idParam } from '@/http/params';

const set = (summary: string, isResolved: boolean) =>
  endpoint(
    { summary, description: 'By whoever raised it.', answer: listOf(CommentView) },
    async ({ params }, { user }) =>
      wholeList(
        await resolveComment(user, revisionKey(params), idParam(params, 'id', 'This comment'), isResolved),
      ),
  );

export const PUT = set('Resolve a comment', true);
export const DELETE = set('Open a resolved comment again', false);
