import type { Written } from './draft';

/** An expression is stored as its text and what was read out of it; its author writes the text. */
const isExpression = (value: object): value is { text: string; tree: unknown } =>
  'text' in value && 'tree' in value && Object.keys(value).length === 2;

function withoutTrees(value: unknown): unknown {
  if (typeof value !== 'object' || value === null) return value;
  if (Array.isArray(value)) return value.map(withoutTrees);
  if (isExpression(value)) return value.text;
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, withoutTrees(inner)]));
}

/** A stored document as its author writes it. */
export const asWritten = (body: object): Written =>
  Object.fromEntries(Object.entries(body).map(([key, value]) => [key, withoutTrees(value)]));
