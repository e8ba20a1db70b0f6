import type { User } from '@/features/account/account';
import { AppError } from '@/lib/app-error';

interface Holder {
  readonly request: Request;
  readonly locals: { readonly user: User | null };
}

/** Who asks, or 401. The middleware found out. */
export function requireUser({ locals, request }: Holder): User {
  if (locals.user) return locals.user;
  const bearer = request.headers.get('authorization') !== null;
  throw new AppError(
    'unauthenticated',
    bearer
      ? 'This token is unknown, expired or withdrawn. Use a current one.'
      : 'You are not signed in, or the session has ended. Sign in, or send a bearer token.',
    { headers: { 'WWW-Authenticate': `Bearer realm="putlog"${bearer ? ', error="invalid_token"' : ''}` } },
  );
}
