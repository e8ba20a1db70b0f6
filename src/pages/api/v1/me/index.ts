import { MeView, toMeView } from '@/features/account/account';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint({ summary: 'Who asks', answer: MeView }, (_, { user }) => toMeView(user));
