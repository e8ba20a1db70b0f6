/** Load groups a member's loads may belong to, in the order they stack on a drawing and in a table. */
export const LOAD_GROUPS = ['G', 'Q', 'S', 'W'] as const;
export type LoadGroup = (typeof LOAD_GROUPS)[number];
export const LOAD_GROUP_NAMES: Record<LoadGroup, string> = {
  G: 'permanent',
  Q: 'imposed',
  S: 'snow',
  W: 'wind',
};

/** The groups of the loads: known ones first, in their usual order, then the practice's own by name. */
export function groupsOf(loads: readonly { readonly group?: string | undefined }[]): string[] {
  const known: readonly string[] = LOAD_GROUPS;
  const rank = (group: string) => (known.includes(group) ? known.indexOf(group) : known.length);
  const present = new Set(loads.flatMap(({ group }) => (group === undefined ? [] : [group])));
  return [...present].sort((a, b) => rank(a) - rank(b) || a.localeCompare(b));
}
