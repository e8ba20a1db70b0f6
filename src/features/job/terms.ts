/** Who sees a job: everybody in the practice, or its named people (its creator, principals and administrators always do). */
export const JOB_ACCESS = ['practice', 'named'] as const;

export const JOB_STATUSES = ['open', 'closed'] as const;
