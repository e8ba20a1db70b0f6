import { MarkRead, UnreadCount } from '@/features/notice/notice';
import { markRead } from '@/features/notice/notice.server';
import { endpoint } from '@/http/endpoint';

export const POST = endpoint(
  {
    summary: 'Mark notices as read',
    description:
      'Some by their `ids`, all that lead to one page by its `href` (without a fragment), or all that were told `until` a moment.',
    body: MarkRead,
    answer: UnreadCount,
  },
  async (_, { user, body }) => ({ unread: await markRead(user, body) }),
);
