import { designationKey, designationParts } from '@/engine/section';
import { ALIKE, OFFERED } from '../query';
import { NO_ANSWER, type Page, pageOf, type RowsFound } from './page';
import type { Asked, Register } from './register';

/** designationRank of the engine for every row, from its family and sizes as the register has them. */
function gradesOf(register: Register, q: string): Uint8Array {
  const asked = designationParts(q);
  const grades = new Uint8Array(register.count).fill(NO_ANSWER);
  if (asked.family === '' && asked.sizes.length === 0) return grades;
  const sizes = asked.sizes.join('x');
  const begun = asked.sizes.map((size) => `x${size}`);
  const grade = (family: string, given: string): number => {
    const isFamily = family === asked.family;
    const isBare = asked.family === '';
    if (given === sizes && (isFamily || isBare)) return isFamily ? 0 : 1;
    if (given.startsWith(sizes) && (isFamily || isBare)) return isFamily ? 2 : 3;
    if (!family.startsWith(asked.family)) return NO_ANSWER;
    const all = `x${given}`;
    return begun.every((size) => all.includes(size)) ? 4 : NO_ANSWER;
  };
  for (let at = 0; at < grades.length; at++) grades[at] = grade(register.family(at), register.sizes(at));
  return grades;
}

/** Of a register, a page of the rows that are called as was asked and meet the rest; none where no section is called so. */
export const named = (register: Register, query: Asked, page: Page): RowsFound =>
  pageOf(register, query, met(register, query, gradesFor(register, query)), page);

/** The same; where nothing at all is called so, the nearest: nobody is left with nothing for a slip of the finger. */
export function find(register: Register, query: Asked, page: Page): RowsFound {
  const grades = gradesFor(register, query);
  if (isCalled(query, grades)) return pageOf(register, query, met(register, query, grades), page);
  const at = nearest(register, query).slice(0, page.limit);
  return { at, next: null, total: at.length };
}

/** 1 for what answers a query as `find` finds it; of the nearest, all. */
export function answering(register: Register, query: Asked): Uint8Array {
  const grades = gradesFor(register, query);
  if (isCalled(query, grades))
    return met(register, query, grades).map((grade) => Number(grade !== NO_ANSWER));
  const answers = new Uint8Array(register.count);
  for (const at of nearest(register, query)) answers[at] = 1;
  return answers;
}

const gradesFor = (register: Register, { q }: Asked): Uint8Array =>
  q === '' ? new Uint8Array(register.count) : gradesOf(register, q);

/** Whether any section is called so, whatever else is asked of it. */
const isCalled = ({ q }: Asked, grades: Uint8Array): boolean =>
  q === '' || grades.some((grade) => grade !== NO_ANSWER);

/** The grades of the rows that meet the rest. */
function met(register: Register, query: Asked, grades: Uint8Array): Uint8Array {
  const meeting = register.meeting(query);
  return grades.map((grade, at) => (meeting[at] === 1 ? grade : NO_ANSWER));
}

function nearest(register: Register, query: Asked): number[] {
  const meeting = register.meeting(query);
  const mass = register.values('mass_kg_m');
  const weight = (at: number) => mass[at] ?? 0;
  return [...register.names.like(designationKey(query.q), ALIKE)]
    .filter(([at]) => meeting[at] === 1)
    .sort(([a, alike], [b, other]) => other - alike || weight(a) - weight(b) || a - b)
    .slice(0, OFFERED)
    .map(([at]) => at);
}
