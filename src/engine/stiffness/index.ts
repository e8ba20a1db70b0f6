export { SingularStiffness } from './band';
export { pointsOf } from './element';
export { type State, type StiffnessPiece, type StiffnessSolution, solveStiffness } from './solve';
