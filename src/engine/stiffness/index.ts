export { SingularStiffness } from './band';
export { pointsOf } from './element';
export { PlainStiffness } from './plain';
export { type State, type StiffnessPiece, type StiffnessSolution, solveStiffness } from './solve';
