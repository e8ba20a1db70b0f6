import { Preferences } from '@/features/notice/notice';
import { readPreferences, savePreferences } from '@/features/notice/preference.server';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint(
  { summary: 'How one takes e-mail about each kind of notice', answer: Preferences },
  (_, { user }) => readPreferences(user),
);

export const PUT = endpoint(
  {
    summary: 'Choose how to take e-mail',
    description: 'At once, once a day, or none. A recall always comes at once and is not among the kinds.',
    body: Preferences,
    answer: Preferences,
  },
  (_, { user, body }) => savePreferences(user, body),
);
