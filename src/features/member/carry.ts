import type { Template } from '@/engine/template';
import type { SaveMember } from './member';

type Parameters = SaveMember['parameters'];

const has = ({ parameters }: Template, symbol: string): boolean =>
  parameters.some((one) => one.symbol === symbol);

/** What is given for another revision of the template: without the parameters that it has no longer. */
export const carryOver = (from: Template, to: Template, given: Parameters): Parameters =>
  Object.fromEntries(Object.entries(given).filter(([symbol]) => has(to, symbol) || !has(from, symbol)));

/** Parameters that the other revision has no longer, and those that are new in it and take their default. */
export const parameterChanges = (from: Template, to: Template) => ({
  gone: from.parameters.filter(({ symbol }) => !has(to, symbol)).map(({ name }) => name),
  taken: to.parameters.filter(({ symbol }) => !has(from, symbol)).map(({ name }) => name),
});
