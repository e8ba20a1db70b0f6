/**
 * Templates in the browser and on the server: reading values, making the beam, judging rules, running proof cases.
 * Two entries stay out of it, because a browser never needs them: `document` (the schema, with Zod) and `parse` and
 * `author` (text to trees, with the maths library).
 */
export { checkTemplate, type TemplateFault } from './check';
export { dimensionOf, type Kind, type KindReading, type Kinds } from './dimension';
export type {
  Arrangement,
  LoadKind,
  ProofCase,
  Result,
  Rule,
  Selector,
  Source,
  Template,
} from './document';
export {
  BrokenExpression,
  evaluateExpression,
  evaluateNumber,
  evaluateTruth,
  type Scalar,
  type Scope,
} from './evaluate';
export {
  type Dimensioned,
  defaultEi,
  type Instance,
  type InstanceOptions,
  type InstanceReading,
  instantiate,
} from './instance';
export type { NamedLoad } from './loads';
export { limitsOf, type ParameterFault, unitOf, type ValueOptions } from './measured';
export type { ChoiceParameter, Column, Parameter, QuantityParameter, RowsParameter, Severity } from './parts';
export { type ProofCheck, type ProofResult, runProofCases } from './proof';
export { judgeRules, type Known, purposeOf, type RuleOutcome } from './rules';
export { letterOf, ruleKinds, scopeOf } from './scope';
export { type Selected, select, selectorDimension, selectorName } from './select';
export { type Expression, symbolsOf, type Tree } from './tree';
export {
  type Parts,
  type Row,
  readParameters,
  totalOf,
  type Value,
  type Values,
  type ValuesReading,
} from './values';
export { writeExpression } from './write';
