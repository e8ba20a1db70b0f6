const NUMBER = /^(\d+\.?\d*|\.\d+)$/;

/** A number as a person types it, without sign: "0.7", "0,7", "1/1.67"; null where it is none. */
export function readDecimal(text: string): number | null {
  const parts = text
    .replaceAll(',', '.')
    .split('/')
    .map((part) => part.trim());
  const [above, below, another] = parts;
  if (above === undefined || another !== undefined || !parts.every((part) => NUMBER.test(part))) return null;
  const value = Number(above) / Number(below ?? 1);
  return Number.isFinite(value) ? value : null;
}
