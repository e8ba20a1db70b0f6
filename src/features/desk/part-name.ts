/** What the parts of a document are called where a change is shown. */
const WORDS: Readonly<Record<string, string>> = {
  materials: 'Materials',
  strength: 'Strength',
  service: 'Service combinations',
  categories: 'ψ',
  patterns: 'How loads stand',
  deflection: 'Deflection limits',
  combinations: 'Combinations',
  factors: 'factor',
  psi0: 'ψ₀',
  psi1: 'ψ₁',
  psi2: 'ψ₂',
  xi: 'ξ',
  fy: 'f_y',
  fu: 'f_u',
  up_to: 'up to',
  not_checked: 'Not checked',
  not_covered: 'Not in it',
  from_memory: 'from memory',
  limit_state: 'made for',
  change_note: 'change note',
  proof_cases: 'Proof cases',
  do_not_use: 'Do not use for',
};

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null;

/** An entry of a list by its name, or by the thickness that it goes to. */
function nameOf(entry: unknown): string | null {
  if (!isObject(entry)) return null;
  const name =
    entry['name'] ?? entry['title'] ?? entry['symbol'] ?? entry['id'] ?? entry['up_to'] ?? entry['group'];
  return typeof name === 'string' && name !== '' ? name : null;
}

/** "Strength › 6.10, imposed leading › factor › Q": a part by its JSON Pointer, in the words of the document. */
export function partName(pointer: string, document: unknown): string {
  const steps = pointer
    .split('/')
    .slice(1)
    .map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
  let inner: unknown = document;
  const names = steps.map((step) => {
    const list = inner;
    inner = isObject(list) ? list[step] : undefined;
    return Array.isArray(list)
      ? (nameOf(inner) ?? `${Number(step) + 1}`)
      : (WORDS[step] ?? step.replaceAll('_', ' '));
  });
  return names.length === 0 ? 'The whole document' : names.join(' › ');
}
