const DATE = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});

/** "1 Dec 2026" */
export const longDate = (iso: string): string => DATE.format(new Date(iso));
