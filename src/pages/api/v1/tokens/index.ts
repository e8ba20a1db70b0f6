import { TokenView } from '@/features/account/session';
import { listTokens } from '@/features/account/token.server';
import { endpoint } from '@/http/endpoint';
import { listOf, wholeList } from '@/http/list';

export const GET = endpoint(
  { summary: 'One’s own bearer tokens, the newest first', answer: listOf(TokenView) },
  async (_, { user }) => wholeList(await listTokens(user)),
);
