/** What a person may be in a practice; several at once. The permission table says what each may do. */
export const ROLES = ['reader', 'engineer', 'checker', 'librarian', 'principal', 'administrator'] as const;

export type Role = (typeof ROLES)[number];
