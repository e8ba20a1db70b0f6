import { endSession } from '@/features/account/session.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const DELETE = endpoint({ summary: 'End one of one’s own sessions' }, ({ params }, { user }) =>
  endSession(user, idParam(params, 'id', 'This session')),
);
