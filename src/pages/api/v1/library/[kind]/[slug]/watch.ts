import { setWatching } from '@/features/review/care.server';
import { endpoint } from '@/http/endpoint';
import { documentKey } from '@/http/library';

export const PUT = endpoint({ summary: 'Be told of every step of a document' }, ({ params }, { user }) =>
  setWatching(user, documentKey(params), true),
);

export const DELETE = endpoint({ summary: 'Be told of its steps no longer' }, ({ params }, { user }) =>
  setWatching(user, documentKey(params), false),
);
