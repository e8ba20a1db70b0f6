import { ColumnChoice } from '@/features/section/column-choice';
import { keepColumnChoice, readColumnChoice } from '@/features/section/column-choice.server';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint(
  {
    summary: 'The columns one has chosen for schedules of sections',
    description: 'Measures as the list of sections names them, in order; null: the usual ones.',
    answer: ColumnChoice,
  },
  (_, { user }) => readColumnChoice(user),
);

export const PUT = endpoint(
  { summary: 'Choose the columns of schedules of sections', body: ColumnChoice, answer: ColumnChoice },
  (_, { user, body }) => keepColumnChoice(user, body),
);
