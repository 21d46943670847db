export type { SolveIntegerProgram } from './cutting/exact'
export type { Bar, CuttingPlan, CuttingProblem } from './cutting/problem'
export { solveCutting } from './cutting/solve'
