/** What a person may be in a practice. A person may hold several. */
export const ROLES = ['reader', 'engineer', 'checker', 'librarian', 'principal', 'administrator'] as const;

export type Role = (typeof ROLES)[number];

/** How quantities are shown and which unit a field takes. */
export const UNIT_SYSTEMS = ['si', 'us'] as const;

export type UnitSystem = (typeof UNIT_SYSTEMS)[number];
