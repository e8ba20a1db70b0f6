/** Several edits of one draft in a row, each made of the draft as the ones before it left it. */
import type { Written } from '@/features/review/draft';
import { applyEdit, type Edit, listAt, type Pointer, textAt } from './edit';
import { declaredSymbols } from './rename';

export class DraftSteps {
  readonly edits: Edit[] = [];
  constructor(public document: Written) {}

  do(edit: Edit): this {
    this.edits.push(edit);
    this.document = applyEdit(this.document, edit).document;
    return this;
  }

  set(at: Pointer, value: unknown): this {
    return this.do({ do: 'set', at, value });
  }

  /** Puts an entry at the end of a list, and returns where it stands. */
  append(list: Pointer, value: unknown): Pointer {
    const { length } = listAt(this.document, list);
    this.do({ do: 'insert', at: `${list}/-`, value });
    return `${list}/${length}`;
  }

  /** A symbol that nothing is called by yet: L, else L2, L3. */
  fresh(symbol: string): string {
    const taken = declaredSymbols(this.document);
    for (let number = 1; ; number++) {
      const candidate = number === 1 ? symbol : `${symbol}${number}`;
      if (!taken.includes(candidate)) return candidate;
    }
  }

  /** Every one of these places that says `from` says `to`. */
  replace(places: readonly Pointer[], from: string, to: string): this {
    for (const at of places) if (sameText(textAt(this.document, at), from)) this.set(at, to);
    return this;
  }
}

/** Whether two expressions are written alike, whatever their spaces. */
export const sameText = (a: string, b: string): boolean => a.replaceAll(' ', '') === b.replaceAll(' ', '');

/** a + b as an author would write it. */
export function plus(a: string, b: string): string {
  if (sameText(a, '0')) return b;
  if (sameText(b, '0')) return a;
  return `${term(a)} + ${term(b)}`;
}

const term = (text: string): string => (/[?<>=!]|\b(and|or|not)\b/.test(text) ? `(${text})` : text);
