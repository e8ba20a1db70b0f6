import { changePassword } from '@/features/account/change-password.server';
import { ChangePassword } from '@/features/account/password';
import { sourceOf } from '@/features/account/sign-in.server';
import { endpoint } from '@/http/endpoint';

export const PUT = endpoint(
  {
    summary: 'Change one’s own password',
    description: 'Every other session of the person ends. Bearer tokens go on.',
    body: ChangePassword,
  },
  (context, { user, body }) => changePassword(user, body, sourceOf(context)),
);
