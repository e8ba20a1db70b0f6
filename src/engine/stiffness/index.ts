export { SingularStiffness } from './band';
export { type State, type StiffnessPiece, type StiffnessSolution, solveStiffness } from './solve';
