import { z } from 'zod';
import { NoticePlace, NoticeView, UnreadCount } from '@/features/notice/notice';
import { listNotices } from '@/features/notice/notice.server';
import { endpoint } from '@/http/endpoint';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'One’s own notices: the unread before the read, each the newest first',
    query: z.strictObject(listQuery),
    answer: listOf(NoticeView).extend(UnreadCount.shape),
  },
  async (_, { user, query: { cursor, limit } }) => {
    const after = cursor === undefined ? undefined : readCursor(cursor, NoticePlace);
    const { next, ...found } = await listNotices(user, { limit, after });
    return { ...found, next: next && writeCursor(next) };
  },
);
