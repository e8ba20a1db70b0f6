import { describe, expect, test } from 'vitest';
import { DIMENSIONS } from '../quantity/index';
import { dimensionOf, type Kind, ofDimension } from './dimension';
import { BrokenExpression, evaluateExpression, evaluateTruth, type Scope } from './evaluate';
import { parseExpression } from './parse';
import { isTree, type Tree } from './tree';
import { writeExpression } from './write';

const treeOf = (text: string): Tree => {
  const parsing = parseExpression(text);
  if (!parsing.ok) throw new Error(`${text}: ${parsing.message}`);
  return parsing.tree;
};

const row = (x: number, P: number): Scope =>
  new Map([
    ['x', x],
    ['P', P],
  ]);
const scope: Scope = {
  get: (symbol) =>
    new Map<string, number | string | Scope[]>([
      ['L', 6],
      ['a', 1.8],
      ['w', 5000],
      ['part', 'overhang'],
      ['loads', [row(2, 1000), row(4, 3000)]],
    ]).get(symbol),
};
const value = (text: string) => evaluateExpression(treeOf(text), scope);

describe('an expression', () => {
  test.each<[string, Tree]>([
    ['L + a', ['+', 'L', 'a']],
    ['w*L^2/8', ['/', ['*', 'w', ['^', 'L', 2]], 8]],
    ['-w*L', ['*', ['neg', 'w'], 'L']],
    ['-2', -2],
    ['+L', 'L'],
    ['1.5e3', 1500],
    ['0 < a <= L', ['and', ['<', 0, 'a'], ['<=', 'a', 'L']]],
    ['part == "both" and not (a > L)', ['and', ['==', 'part', ['text', 'both']], ['not', ['>', 'a', 'L']]]],
    ['a > 0 ? L : 0', ['if', ['>', 'a', 0], 'L', 0]],
    ['sum(loads, P*(L - x)/L)', ['sum', 'loads', ['/', ['*', 'P', ['-', 'L', 'x']], 'L']]],
  ])('%s is stored as a plain tree', (text, tree) => {
    expect(treeOf(text)).toEqual(tree);
    expect(isTree(JSON.parse(JSON.stringify(tree)))).toBe(true);
  });

  test.each<[string, number | boolean]>([
    ['2 + 3 * 4', 14],
    ['-2^2', -4],
    ['2^3^2', 512],
    ['(L - a)/2', 2.1],
    ['max(L, a, 7) - min(L, a)', 5.2],
    ['sqrt(abs(-9))', 3],
    ['sum(loads, P*(L - x)/L)', 1000 * (4 / 6) + 3000 * (2 / 6)],
    ['count(loads)', 2],
    ['part == "overhang" ? a : L', 1.8],
    ['part != "both" and a < L', true],
    ['a <= 0.3*L', true],
    ['a < 0.3*L', false],
    ['a >= 0.3*L', true],
    ['a > 0.3*L', false],
  ])('%s is %s', (text, expected) => {
    expect(value(text)).toBe(expected);
  });

  test('a comparison allows for the last bit of a product', () => {
    for (let L = 0.1; L < 20; L += 0.1) {
      const at = new Map([
        ['L', L],
        ['a', Number((L * 0.9).toFixed(9))],
      ]);
      expect(evaluateExpression(treeOf('a <= 0.9*L'), at)).toBe(true);
    }
  });

  test('a division by zero is not finite, and left to the caller', () => {
    expect(value('L/(a - a)')).toBe(Number.POSITIVE_INFINITY);
  });

  test('a tree that does not fit the scope throws', () => {
    expect(() => evaluateExpression('unknown', new Map())).toThrow(BrokenExpression);
    expect(() => value('part + 1')).toThrow(BrokenExpression);
    expect(() => value('sum(L, L)')).toThrow(BrokenExpression);
    expect(() => evaluateTruth('L', scope)).toThrow('"L" is not a condition');
    expect(() => evaluateExpression(['eval', 1] as never, scope)).toThrow('No operation eval');
  });

  test.each([
    'w*L^2/8',
    'L - (a - 1)',
    '(L + a)*2',
    '(-L)^2',
    '-L^2',
    'L*(-2)',
    'part == "span"',
    'part == "span" ? L : a',
    'sum(loads, P*x)',
    'not (a > 1 and L > 2)',
  ])('%s is written back so that it reads the same', (text) => {
    expect(treeOf(writeExpression(treeOf(text)))).toEqual(treeOf(text));
  });
});

const kinds = new Map<string, Kind>([
  ['L', ofDimension(DIMENSIONS.length)],
  ['a', ofDimension(DIMENSIONS.length)],
  ['w', ofDimension(DIMENSIONS.line_load)],
  ['EI', ofDimension(DIMENSIONS.bending_stiffness)],
  ['part', { is: 'text', values: ['overhang', 'span'] }],
  [
    'loads',
    {
      is: 'rows',
      columns: new Map([
        ['x', ofDimension(DIMENSIONS.length)],
        ['P', ofDimension(DIMENSIONS.force)],
      ]),
    },
  ],
]);

describe('the dimension of an expression', () => {
  test.each([
    ['w*L^2/8', DIMENSIONS.moment],
    ['5*w*L^4/(384*EI)', DIMENSIONS.length],
    ['sqrt(a*(L + a)/3)', DIMENSIONS.length],
    ['L + 0', DIMENSIONS.length],
    ['max(0, a)', DIMENSIONS.length],
    ['sum(loads, P*x)', DIMENSIONS.moment],
    ['count(loads)', DIMENSIONS.ratio],
    ['(a/L)^(a/L)', DIMENSIONS.ratio],
    ['L^(1/2)*L^(3/2)', DIMENSIONS.area],
    ['min(0, 0) + a', DIMENSIONS.length],
    ['sqrt(0) + L', DIMENSIONS.length],
  ])('%s is sound', (text, dimension) => {
    expect(dimensionOf(treeOf(text), kinds)).toEqual({ ok: true, kind: ofDimension(dimension) });
  });

  test.each([
    ['L + w', 'L + w is a length plus a force per length.'],
    ['w*L^3/8 - w*L^2/8', 'w*L^3/8 - w*L^2/8 is a bending stiffness minus a moment.'],
    ['L < w', 'L < w is a length compared with a force per length.'],
    ['L^a', 'L^a has a length as its exponent. Use a number.'],
    ['L^(a/L)', 'L^(a/L) raises a length to a varying power. Use a fixed number.'],
    ['sin(L)', 'sin(L) takes an angle, and is given a length.'],
    ['b + 1', 'There is no “b”. Use L, a, w, EI, part, loads.'],
    ['part + 1', 'part + 1 calculates with a choice. Use numbers.'],
    ['part == "spam"', '“spam” is no value here. Use overhang, span.'],
    ['L and a', 'L and a takes conditions, and one part is a length.'],
    ['L ? a : L', 'The part before “?” in (L ? a : L) is no condition.'],
    ['sum(L, a)', '“L” in sum is no list of rows.'],
    ['L/0', 'L/0 divides by zero.'],
    ['0 and L > a', '0 and L > a takes conditions, and one part is zero.'],
    ['"spam" == part', '“spam” is no value here. Use overhang, span.'],
    ['sin(part)', 'sin(part) calculates with a choice. Use numbers.'],
    ['loads + 1', 'loads + 1 calculates with a list of rows. Use numbers.'],
  ])('%s is refused in words', (text, message) => {
    expect(dimensionOf(treeOf(text), kinds)).toEqual({ ok: false, message });
  });
});

/** Names that look like a symbol and mean nothing: the check of dimensions refuses them. */
const STRANGERS = [
  'process',
  'self',
  'window',
  'document',
  'eval',
  'require',
  'import',
  'i',
  'e',
  'pi',
  'Infin',
  'x',
];

/** Each tries to reach something other than arithmetic, or to cost time or memory. One per line. */
const WRITTEN = String.raw`
constructor
constructor()
constructor("return 1")()
__proto__
__proto__.x
toString
valueOf()
hasOwnProperty("a")
L.constructor
L["constructor"]
L.__proto__
cos.constructor("return 1")()
f.call(1)
L?.a
import("fs")
require("fs")
eval("1")
evaluate("1")
parse("1")
simplify("1")
derivative("x", "x")
createUnit("x")
import({a: 1})
config({})
typed("a", f)
help(sin)
compile("1")
chain(1)
reviver("a", 1)
process.exit()
globalThis.x
window["x"]
document.x
this.x
self()
Function("x")()
L = 3
L := 3
f(x) = x
a = b = 3
L += 1
x -> x
function(x)
(x) => x
map(x, y)
new L
1:1e9
1:2:3
(1:1e9)
zeros(1e9)
ones(1e5, 1e5)
range(1, 1e9)
matrix(1)
concat("a", "b")
[1, 2, 3]
[1, 2; 3, 4]
L[1]
L[1:2]
{a: 1}
{"__proto__": 1}
{}
[]
L{1}
random()
1; 2
# comment
1 # 2
/* a */ 1
'a'
"a\"
"<b>"
"A b"
5!
170!
1000000!
L'
5 mod 3
5 % 3
1 xor 1
1 & 1
1 | 1
~1
1 << 40
1 >>> 1
5 cm
5 in
L to cm
2 L
2(3)
L(a)
sin L
L a
factorial(20)
gamma(5)
exp(1)
1e999
-1e999
Infinity
-Infinity
NaN
null
undefined
true
false
1e1e1e
0x
1..2
(
)
()
L +
* L
L ^^ 2
L,, a
max
max()
sqrt()
sqrt(1, 2)
sum(loads)
sum(1, 2)
sum(sum(loads, x), 1)
count("a")
count()
abs(1, 2)
L;
L =
=
==
< L
not
α
L²
L·a
L × a
½
L – a
１＋１
ℓ
@L
$L
L\a
toolongsymbol`;

const HOSTILE = [
  ...WRITTEN.trim().split('\n'),
  ...['', ' ', '1\n2', 'L\n= 3', 'L\u0000', 'L\u202e', '`1`', `"${'a'.repeat(290)}"`],
  ...['(', '-(', 'max(', 'f(', 'L(', 'abs(1+'].map((text) => text.repeat(150).slice(0, 299)),
  ...['2^', '1?', '1<', 'L.', '1,', '1+', 'not '].map((text) => `${text.repeat(150).slice(0, 298)}1`),
  ...[
    `${'('.repeat(149)}1${')'.repeat(149)}`,
    `${'abs('.repeat(50)}1${')'.repeat(50)}`,
    `${'-'.repeat(299)}1`,
  ],
  ...['a'.repeat(300), `${'9'.repeat(280)}e99`, '1+'.repeat(1e6)],
];

describe(`${HOSTILE.length} hostile expressions`, () => {
  test('are each refused with a code, a message and a place', () => {
    expect(HOSTILE.length).toBeGreaterThanOrEqual(100);
    for (const text of HOSTILE) {
      const parsing = parseExpression(text);
      expect(parsing.ok, `${text.slice(0, 60)} must be refused`).toBe(false);
      if (parsing.ok) continue;
      expect(parsing.message).not.toBe('');
      expect(parsing.at).toBeGreaterThanOrEqual(0);
      expect(parsing.at).toBeLessThanOrEqual(text.length);
    }
  });

  test.each(STRANGERS)('and the unknown symbol %s is refused by its dimension', (text) => {
    const parsing = parseExpression(text);
    expect(parsing.ok && dimensionOf(parsing.tree, kinds).ok).toBe(false);
  });

  test('are each refused within 5 ms, at the best of five tries', () => {
    for (const text of HOSTILE) {
      const times = Array.from({ length: 5 }, () => {
        const start = performance.now();
        parseExpression(text);
        return performance.now() - start;
      });
      expect(Math.min(...times), text.slice(0, 60)).toBeLessThan(5); // the best: other processes share the machine
    }
  });

  test.each([
    [['eval', 1]],
    [['constructor']],
    ['constructor'],
    ['__proto__'],
    [['+', 1]],
    [['+', 1, 2, 3]],
    [[[]]],
    [{}],
    [null],
    [Number.NaN],
    [['text', 'A b']],
    [['neg', ['neg', { length: 1 }]]],
  ])('a stored tree %j is refused', (tree) => {
    expect(isTree(tree)).toBe(false);
  });

  test('a stored tree that nests without end is refused', () => {
    let tree: Tree = 1;
    for (let depth = 0; depth < 200; depth++) tree = ['neg', tree];
    expect(isTree(tree)).toBe(false);
  });
});
