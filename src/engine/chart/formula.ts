import { add, constant, divide, type Expression, multiply, negate, power, symbol } from './expression';
import { fromDecimal } from './rational';

const TOKEN = /\s*(?:(\d+(?:\.\d+)?)|([A-Za-z][A-Za-z0-9_]*)|([-+*/^()]))/y;

/**
 * An expression from text: numbers, symbols, + − * / ^ and brackets, e.g. "P*a^2*(3*L-a)/(6*EI)".
 * Exponents are whole numbers. Fails with SyntaxError at anything else, RangeError where it divides by zero.
 */
export function formula(text: string): Expression {
  const tokens = tokenize(text);
  let next = 0;
  const take = (expected: string) => {
    const found = tokens[next] === expected;
    if (found) next++;
    return found;
  };

  const total = (): Expression => {
    let result = take('-') ? negate(term()) : term();
    for (;;) {
      if (take('+')) result = add(result, term());
      else if (take('-')) result = add(result, negate(term()));
      else return result;
    }
  };
  const term = (): Expression => {
    let result = factor();
    for (;;) {
      if (take('*')) result = multiply(result, factor());
      else if (take('/')) result = divide(result, factor());
      else return result;
    }
  };
  const factor = (): Expression => {
    const base = atom();
    if (!take('^')) return base;
    const sign = take('-') ? -1 : 1;
    const exponent = Number(tokens[next++]);
    if (!Number.isInteger(exponent)) throw new SyntaxError(`"${text}" needs a whole exponent`);
    return power(base, sign * exponent);
  };
  const atom = (): Expression => {
    if (take('(')) {
      const inside = total();
      if (!take(')')) throw new SyntaxError(`"${text}" lacks a closing bracket`);
      return inside;
    }
    const token = tokens[next++];
    if (token === undefined || /^[-+*/^)]$/.test(token)) throw new SyntaxError(`"${text}" lacks a value`);
    return /^\d/.test(token) ? constant(fromDecimal(token)) : symbol(token);
  };

  const result = total();
  if (next < tokens.length) throw new SyntaxError(`"${text}" is not understood from "${tokens[next]}"`);
  return result;
}

function tokenize(text: string): string[] {
  const tokens: string[] = [];
  TOKEN.lastIndex = 0;
  while (TOKEN.lastIndex < text.trimEnd().length) {
    const at = TOKEN.lastIndex;
    const match = TOKEN.exec(text);
    if (!match) throw new SyntaxError(`"${text}" is not understood at character ${at + 1}`);
    tokens.push(match[1] ?? match[2] ?? match[3]!);
  }
  return tokens;
}
