import { revokeToken } from '@/features/account/token.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const DELETE = endpoint(
  { summary: 'Withdraw one of one’s own bearer tokens' },
  ({ params }, { user }) => revokeToken(user, idParam(params, 'id', 'This token')),
);
