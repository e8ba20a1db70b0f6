/** A number as a person types it, without sign: "0.7", "0,7", ".7"; null where it is none. */
export function readDecimal(text: string): number | null {
  const plain = text.trim().replace(',', '.');
  return /^(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}
