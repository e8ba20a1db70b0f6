/**
 * Templates in the browser and on the server: reading values, making the beam, judging rules, running proof cases.
 * Two entries stay out of it, because a browser never needs them: `document` (the schema, with Zod) and `parse` and
 * `author` (text to trees, with the maths library).
 */
export { dimensionOf, type KindReading } from './dimension';
export type { Arrangement, LoadKind, Selector, Source, Template } from './document';
export { evaluateNumber, evaluateTruth, rowsOf, type Scope, within } from './evaluate';
export { type Dimensioned, type Instance, type InstanceOptions, instantiate } from './instance';
export type { NamedLoad } from './loads';
export { limitsOf, type ParameterFault, unitOf } from './measured';
export type { Column, Parameter, QuantityParameter, RowsParameter, Severity } from './parts';
export { type ProofResult, runProofCases } from './proof';
export { judgeRules, type RuleOutcome } from './rules';
export { ruleKinds } from './scope';
export { select, selectorDimension } from './select';
export { type Expression, symbolsOf, type Tree } from './tree';
export { isRows, type Row, readParameters, type Value, type Values } from './values';
