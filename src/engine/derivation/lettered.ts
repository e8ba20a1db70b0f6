/** The solved beam in letters, and how its movements are found: what the working of one number is made of. */
export { rightSide } from './coefficients';
export { type Movements, movementsOf } from './movements';
export { type NamedBeam, nameBeam } from './named-beam';
export { loadsOn, movementsOn, type Piece, partOn, unitOn, yieldingOn } from './pieces';
export { equilibrium, type Part } from './statics';
export { fixingSense, fixingTex, flexibilityTex, gapTex, reactionTex, type Unknown } from './unknown';
export { type Worked, work } from './values';
export { causeTex, causeWords, nameForce, nameMovement } from './words';
