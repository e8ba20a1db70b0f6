import { CommentView, NewComment } from '@/features/review/comment';
import { addComment, listComments } from '@/features/review/comment.server';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';
import { listOf, wholeList } from '@/http/list';

export const GET = endpoint(
  { summary: 'What was said of a revision, the oldest first', answer: listOf(CommentView) },
  async ({ params }, { user }) => wholeList(await listComments(user, revisionKey(params))),
);

export const POST = endpoint(
  {
    summary: 'Comment on a part of a revision, or answer a comment',
    body: NewComment,
    answer: listOf(CommentView),
    status: 201,
  },
  async ({ params }, { user, body }) => wholeList(await addComment(user, revisionKey(params), body)),
);
